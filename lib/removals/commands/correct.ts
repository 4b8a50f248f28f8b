/** Correcting removals and receipts: always possible, with a reason, both shown in the history. */
import "server-only";
import type * as z from "zod";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { newId, type Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { correctAct, postAct, type ActMeta } from "@/lib/ledger/commands/post";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { correctReceiptEndpoint } from "../contract/receipts";
import type { CorrectRemovalInput, CorrectRemovalReceipt } from "../contract/removals";
import {
  getLiveReceipt,
  getStoredRemoval,
  listStandingLines,
  type StoredReceipt,
  type StoredRemoval,
} from "../queries/stored";
import { insertRemovalIn } from "./insert";
import { planRemoval, type PlannedRemoval } from "./plan";
import {
  insertReceiptIn,
  receiptDrafts,
  requireFreshNumber,
  requireReceiptDay,
  requireReceiptOf,
  setReceiptStateIn,
} from "./receipts";

/**
 * Takes a removal back, whatever was done since, and posts what should have stood there. A receipt proves the parts of
 * the removal that it was entered for, so it is taken back first and, where the new removal passes on too, entered
 * again for the new parts, with its own number, day and weight. One transaction; each of the three is an act of its own,
 * because the receipt's parts are known only once the new removal stands.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, and for the replacement what a removal is refused
 *   for, but never for being more than the book holds
 */
export function correctRemoval(ctx: Context, input: CorrectRemovalInput): CorrectRemovalReceipt {
  allow(ctx, "removals.record");
  return once<CorrectRemovalReceipt>(
    ctx,
    `POST /api/removals/${input.id}/correct`,
    input.requestId,
    (tx) => {
      const meta = metaOf(ctx);
      const wrong = requireStanding(getStoredRemoval(tx, input.id));
      const receipt = getLiveReceipt(tx, wrong.id);
      if (receipt) takeReceiptBack(tx, meta, receipt, input.reason);

      const newRemovalId = input.requestId as Id<"removal">;
      const planned =
        input.replacement &&
        planRemoval(
          tx,
          ctx,
          { ...input.replacement, confirmedAbove: true, reservedToo: true },
          { lines: listStandingLines(tx, wrong.actId), destinationId: wrong.destinationId },
          ["replacement"],
        );
      const { actId } = correctAct(
        tx,
        meta,
        { actId: wrong.actId, subject: `removal:${wrong.id}`, note: input.reason },
        planned ? planned.drafts(`removal:${newRemovalId}`) : [],
      );
      prepared(
        tx.client,
        "update removals set state = 'corrected', undone_act_id = ? where id = ?",
      ).run(actId, wrong.id);
      let became: CorrectRemovalReceipt["receipt"] = receipt ? "taken-back" : "none";
      if (planned && input.replacement) {
        insertRemovalIn(tx, ctx, planned, {
          id: newRemovalId,
          noteNumber: input.replacement.noteNumber,
          corrects: wrong.id,
          actId,
        });
        if (receipt && planned.destination.route === "passed-on") {
          enterReceiptAgain(tx, ctx, receipt, newRemovalId, planned, actId);
          became = "kept";
        }
      }
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "removal",
        subjectId: wrong.id,
        replacementId: planned ? newRemovalId : null,
        reason: input.reason,
        doneBy: meta.doneBy,
        actId,
      });
      recordAudit(tx, ctx, {
        action: "removals.correct",
        subjectKind: "removal",
        subjectId: wrong.id,
        fields: {
          gramsBefore: wrong.grams,
          grams: planned?.grams ?? null,
          replacement: planned ? newRemovalId : null,
          receipt: became,
        },
        actId,
      });
      return {
        id: wrong.id,
        replacementId: planned ? newRemovalId : null,
        grams: planned?.grams ?? null,
        receipt: became,
      };
    },
  );
}

type CorrectReceiptInput = z.output<typeof correctReceiptEndpoint.input>;
type CorrectedReceipt = z.output<typeof correctReceiptEndpoint.output>;

/**
 * Takes a receipt back and enters what should have stood there, as one act.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, and for the replacement `receipt-number-used`,
 *   `future-time`, `too-long-ago`, `receipt-too-early`
 */
export function correctReceipt(ctx: Context, input: CorrectReceiptInput): CorrectedReceipt {
  allow(ctx, "removals.record");
  return once<CorrectedReceipt>(
    ctx,
    `POST /api/removals/${input.id}/receipt/correct`,
    input.requestId,
    (tx) => {
      const meta = metaOf(ctx);
      const wrong = requireStanding(requireReceiptOf(tx, input.id, input.receiptId));
      const removal = getStoredRemoval(tx, wrong.removalId);
      if (!removal) throw new AppError("not-found");
      const receiptId = input.requestId as Id<"removal-receipt">;
      const at = ["replacement"];
      let occurredAt: Instant | null = null;
      if (input.replacement) {
        requireFreshNumber(tx, removal, input.replacement.number, wrong.id, at);
        occurredAt = requireReceiptDay(tx, ctx, removal, input.replacement.day, at);
      }
      const { actId } = correctAct(
        tx,
        meta,
        { actId: wrong.actId, subject: `removal-receipt:${wrong.id}`, note: input.reason },
        occurredAt === null ? [] : receiptDrafts(tx, removal.actId, receiptId, occurredAt),
      );
      setReceiptStateIn(tx, wrong.id, "corrected", actId);
      if (input.replacement && occurredAt !== null) {
        insertReceiptIn(tx, ctx, {
          ...input.replacement,
          receiptId,
          removalId: removal.id,
          occurredAt,
          actId,
        });
      }
      const replacementId = input.replacement ? receiptId : null;
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "removal-receipt",
        subjectId: wrong.id,
        replacementId,
        reason: input.reason,
        doneBy: meta.doneBy,
        actId,
      });
      recordAudit(tx, ctx, {
        action: "removals.receipt-correct",
        subjectKind: "removal",
        subjectId: removal.id,
        fields: { receiptId: wrong.id, replacement: replacementId },
        actId,
      });
      return { receiptId: wrong.id, replacementId };
    },
  );
}

function metaOf(ctx: Context): ActMeta {
  const person = requirePerson(ctx);
  return { now: ctx.now, doneBy: person, sentBy: person, device: null };
}

function requireStanding<Stored extends StoredRemoval | StoredReceipt>(
  found: Stored | null,
): Stored {
  if (!found) throw new AppError("not-found");
  if (found.state === "corrected") throw new AppError("corrected-already");
  if (found.state !== "posted") throw new AppError("undone-already");
  return found;
}

function takeReceiptBack(tx: Tx, meta: ActMeta, receipt: StoredReceipt, reason: string): void {
  const { actId } = correctAct(
    tx,
    meta,
    { actId: receipt.actId, subject: `removal-receipt:${receipt.id}`, note: reason },
    [],
  );
  setReceiptStateIn(tx, receipt.id, "corrected", actId);
}

/** The same paper for the removal that now stands; not before it left. */
function enterReceiptAgain(
  tx: Tx,
  ctx: Context,
  receipt: StoredReceipt,
  removalId: Id<"removal">,
  planned: PlannedRemoval,
  removalActId: number,
): void {
  const receiptId = newId<"removal-receipt">(ctx.now);
  const occurredAt = Math.max(receipt.occurredAt, planned.occurredAt) as Instant;
  const { actId } = postAct(
    tx,
    metaOf(ctx),
    receiptDrafts(tx, removalActId, receiptId, occurredAt),
  );
  const { number, receivedGrams } = receipt;
  insertReceiptIn(tx, ctx, { receiptId, removalId, number, receivedGrams, occurredAt, actId });
}
