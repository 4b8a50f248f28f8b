/**
 * The same request twice gives the same answer and one effect. Receipts are kept for good and looked up
 * inside the write transaction; refusals are not stored, because a throw rolls back, nor are questions, so that
 * the same record can be sent again with its answer.
 */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { actorId, type Context } from "./context";
import { inTransaction, prepared, type Tx } from "./database";

type Stored = { sender: string; endpoint: string; bodyHash: string; answer: string };

/**
 * Runs a command's transaction once for a request id.
 *
 * @param endpoint "POST /api/weigh-ins"
 * @param requestId UUIDv7 made by the client
 * @param keeps false for an answer that wrote nothing and asks something back
 * @throws AppError `request-id-reused` for the same id with another body, sender or endpoint
 */
export function once<Answer>(
  ctx: Context,
  endpoint: string,
  requestId: string,
  work: (tx: Tx) => Answer extends PromiseLike<unknown> ? never : Answer,
  keeps: (answer: Answer) => boolean = () => true,
): Answer {
  return inTransaction<Answer>(ctx, (tx) => {
    const stored = prepared(
      tx.client,
      "select sender, endpoint, body_hash as bodyHash, answer from receipts where request_id = ?",
    ).get(requestId) as Stored | undefined;
    const sender = actorId(ctx);
    if (stored) {
      if (
        stored.sender !== sender ||
        stored.endpoint !== endpoint ||
        stored.bodyHash !== ctx.bodyHash
      ) {
        throw new AppError("request-id-reused");
      }
      return JSON.parse(stored.answer) as Answer extends PromiseLike<unknown> ? never : Answer;
    }
    const answer = work(tx);
    if (!keeps(answer)) return answer;
    prepared(
      tx.client,
      "insert into receipts (request_id, sender, endpoint, body_hash, answer, at) values (?, ?, ?, ?, ?, ?)",
    ).run(requestId, sender, endpoint, ctx.bodyHash, JSON.stringify(answer), ctx.now);
    return answer;
  });
}
