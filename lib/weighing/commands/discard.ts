import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { discardReadingEndpoint, ReviewReadingInput } from "../contract/corrections";
import { requireForReview } from "./correct";

/**
 * Sets a second reading aside, with a reason; the first stands, and the ledger is not touched.
 *
 * @throws AppError `not-found`, `not-for-review`
 */
export function discardReading(
  ctx: Context,
  input: ReviewReadingInput,
): z.output<typeof discardReadingEndpoint.output> {
  allow(ctx, "weighing.review");
  const person = requirePerson(ctx);
  return once(ctx, `POST /api/weigh-ins/${input.id}/discard`, input.requestId, (tx) => {
    const reading = requireForReview(tx, input.id);
    prepared(
      tx.client,
      "update weigh_ins set state = 'discarded', reviewed_by = ?, reviewed_at = ? where id = ?",
    ).run(person, ctx.now, reading.id);
    recordAudit(tx, ctx, {
      action: "weighing.discard",
      subjectKind: "weigh-in",
      subjectId: reading.id,
      fields: { bagId: reading.bagId, netGrams: reading.netGrams },
      personal: { reason: input.reason },
    });
    return { id: reading.id, code: reading.code };
  });
}
