/** A lead looks at counts: lets one stand, or puts it right. */
import "server-only";
import type * as z from "zod";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { correctAct, postAct } from "@/lib/ledger/commands/post";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type {
  AcceptCountInput,
  acceptCountEndpoint,
  correctCountEndpoint,
  CorrectCountInput,
} from "../contract/counts";
import { requireCount, type StoredCount } from "../queries/counts";
import { bookGrams, lotOf } from "../queries/lot-record";
import type { CountKind } from "../terms";
import { closeLotIn } from "./close-lot";
import { countDraft, insertCountIn, readFound, type CountToPost } from "./post-count";

/**
 * Lets a count stand.
 *
 * @throws AppError `not-found`, `not-for-review` when somebody looked at it already or it was taken back
 */
export function acceptCount(
  ctx: Context,
  input: AcceptCountInput,
): z.output<typeof acceptCountEndpoint.output> {
  allow(ctx, "stock.review");
  const person = requirePerson(ctx);
  return once<z.output<typeof acceptCountEndpoint.output>>(
    ctx,
    `POST /api/counts/${input.id}/accept`,
    input.requestId,
    (tx) => {
      const count = requireCount(tx, input.id);
      if (count.state !== "posted" || count.reviewedAt !== null) {
        throw new AppError("not-for-review");
      }
      prepared(tx.client, "update counts set reviewed_by = ?, reviewed_at = ? where id = ?").run(
        person,
        ctx.now,
        count.id,
      );
      recordAudit(tx, ctx, {
        action: "stock.accept-count",
        subjectKind: "count",
        subjectId: count.id,
        fields: { lotId: count.lotId },
      });
      return { countId: count.id, reviewedAt: ctx.now };
    },
  );
}

/**
 * Takes a count back and posts what was there, against the book as it stood when it was counted. It always goes
 * through; what the lot no longer holds is settled as difference.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, and what {@link readFound} throws
 */
export function correctCount(
  ctx: Context,
  input: CorrectCountInput,
): z.output<typeof correctCountEndpoint.output> {
  allow(ctx, "stock.review");
  const person = requirePerson(ctx);
  return once<z.output<typeof correctCountEndpoint.output>>(
    ctx,
    `POST /api/counts/${input.id}/correct`,
    input.requestId,
    (tx) => {
      const count = requireCount(tx, input.id);
      if (count.state === "undone") throw new AppError("undone-already");
      if (count.state === "corrected") throw new AppError("corrected-already");
      const later = count.actId === null ? { uses: [], count: 0 } : listLaterUses(tx, count.actId);
      const replacement = input.replacement && replacementOf(tx, count, input, person);
      const draft = replacement && countDraft(replacement, count.bookGrams);
      const meta = { now: ctx.now, doneBy: person, sentBy: person, device: null };
      const subject = `count:${count.id}`;
      const drafts = draft ? [{ ...draft, note: input.reason }] : [];
      const actId =
        count.actId !== null
          ? correctAct(tx, meta, { actId: count.actId, subject, note: input.reason }, drafts).actId
          : drafts.length > 0
            ? postAct(tx, meta, drafts).actId
            : null;
      prepared(
        tx.client,
        "update counts set state = 'corrected', undone_act_id = ? where id = ?",
      ).run(count.actId === null ? null : actId, count.id);
      if (replacement) {
        insertCountIn(tx, ctx, replacement, {
          book: count.bookGrams,
          actId: draft ? actId : null,
        });
        if (replacement.kind === "empty") closeLotIn(tx, count.lotId, ctx.now, "empty");
      }
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "count",
        subjectId: count.id,
        replacementId: replacement?.countId ?? null,
        reason: input.reason,
        doneBy: person,
        // 0: both agreed with the book, and nothing moved.
        actId: actId ?? 0,
      });
      const lot = lotOf(tx, count.lotId);
      recordAudit(tx, ctx, {
        action: "stock.correct-count",
        subjectKind: "count",
        subjectId: count.id,
        fields: {
          lotId: count.lotId,
          countedBefore: count.countedGrams,
          countedGrams: replacement?.found.grams ?? null,
          laterUses: later.count,
        },
        personal: { reason: input.reason },
        actId,
      });
      return {
        countId: count.id,
        replacementId: replacement?.countId ?? null,
        number: lot.number,
        heldGrams: bookGrams(tx, lot),
        later,
      };
    },
  );
}

function replacementOf(
  tx: Tx,
  count: StoredCount,
  input: CorrectCountInput,
  person: CountToPost["reviewedBy"],
): CountToPost | null {
  if (!input.replacement) return null;
  const found = readFound(tx, input.replacement, count.occurredAt, ["replacement"]);
  return {
    countId: input.requestId as Id<"count">,
    kind: kindOf(count.kind, input.replacement.found === "empty"),
    lot: lotOf(tx, count.lotId),
    found,
    occurredAt: count.occurredAt,
    ...(count.sheet === null ? {} : { sheet: count.sheet }),
    corrects: count.id,
    reviewedBy: person,
  };
}

/** An opening stays one; else an empty bin is one, and what was not empty after all is a plain count. */
function kindOf(before: CountKind, empty: boolean): CountKind {
  if (before === "opening") return "opening";
  if (empty) return "empty";
  return before === "empty" ? "count" : before;
}
