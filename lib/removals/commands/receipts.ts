/** The receiver's receipt: it proves what was passed on, on its own day; and taking it back. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { dayOf, formatDay, type Instant } from "@/lib/core/time";
import { judgeUndo } from "@/lib/core/undo";
import { postAct, reverseAct, type Draft } from "@/lib/ledger/commands/post";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type { enterReceiptEndpoint, undoReceiptEndpoint } from "../contract/receipts";
import {
  getLiveReceipt,
  getReceiptByNumber,
  getStoredReceipt,
  getStoredRemoval,
  listPassedOn,
  type StoredReceipt,
  type StoredRemoval,
} from "../queries/stored";
import { receiptEntries } from "../rules";
import { requireDay } from "./plan";

type EnterInput = z.output<typeof enterReceiptEndpoint.input>;
type Entered = z.output<typeof enterReceiptEndpoint.output>;

/**
 * Enters a receipt. What the receiver weighed is kept beside what the shed weighed, and not posted.
 *
 * @throws AppError `not-found`, `removal-taken-back`, `receipt-not-needed`, `receipt-exists`, `receipt-number-used`,
 *   `future-time`, `too-long-ago`, `receipt-too-early`
 */
export function enterReceipt(ctx: Context, input: EnterInput): Entered {
  allow(ctx, "removals.record");
  const person = requirePerson(ctx);
  return once<Entered>(ctx, `POST /api/removals/${input.id}/receipt`, input.requestId, (tx) => {
    const removal = requireProvable(tx, input.id);
    const live = getLiveReceipt(tx, removal.id);
    const { timeZone } = requireScheme(tx);
    if (live) {
      const day = formatDay(dayOf(live.occurredAt, timeZone));
      throw new AppError("receipt-exists", { number: live.number, day });
    }
    requireFreshNumber(tx, removal, input.number, null, []);
    const occurredAt = requireReceiptDay(tx, ctx, removal, input.day, []);
    const receiptId = input.requestId as Id<"removal-receipt">;
    const { actId } = postAct(
      tx,
      { now: ctx.now, doneBy: person, sentBy: person, device: null },
      receiptDrafts(tx, removal.actId, receiptId, occurredAt),
    );
    insertReceiptIn(tx, ctx, { ...input, receiptId, removalId: removal.id, occurredAt, actId });
    recordAudit(tx, ctx, {
      action: "removals.receipt",
      subjectKind: "removal",
      subjectId: removal.id,
      fields: {
        receiptId,
        number: input.number,
        receivedGrams: input.receivedGrams,
        provenGrams: removal.grams,
      },
      actId,
    });
    return { receiptId, removalId: removal.id, number: input.number, provenGrams: removal.grams };
  });
}

/**
 * Takes a receipt back: what it proved is unproven again.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, `undo-not-yours`, `undo-too-late`
 */
export function undoReceipt(
  ctx: Context,
  input: z.output<typeof undoReceiptEndpoint.input>,
): z.output<typeof undoReceiptEndpoint.output> {
  allow(ctx, "removals.record");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoReceiptEndpoint.output>>(
    ctx,
    `POST /api/removals/${input.id}/receipt/undo`,
    input.requestId,
    (tx) => {
      const receipt = requireReceiptOf(tx, input.id, input.receiptId);
      const verdict = judgeUndo(receipt, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      const { actId } = reverseAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: receipt.actId, subject: `removal-receipt:${receipt.id}` },
      );
      setReceiptStateIn(tx, receipt.id, "undone", actId);
      recordAudit(tx, ctx, {
        action: "removals.receipt-undo",
        subjectKind: "removal",
        subjectId: receipt.removalId,
        fields: { receiptId: receipt.id },
        actId,
      });
      return { receiptId: receipt.id, removalId: receipt.removalId };
    },
  );
}

function requireProvable(tx: Tx, id: Id<"removal">): StoredRemoval {
  const removal = getStoredRemoval(tx, id);
  if (!removal) throw new AppError("not-found");
  if (removal.state !== "posted") throw new AppError("removal-taken-back");
  if (removal.route !== "passed-on") throw new AppError("receipt-not-needed");
  return removal;
}

/** @throws AppError `not-found` for a receipt of another removal */
export function requireReceiptOf(
  tx: Tx,
  removalId: Id<"removal">,
  receiptId: Id<"removal-receipt">,
): StoredReceipt {
  const receipt = getStoredReceipt(tx, receiptId);
  if (receipt?.removalId !== removalId) throw new AppError("not-found");
  return receipt;
}

/** One paper proves one removal: the same number of the same receiver is the same receipt. */
export function requireFreshNumber(
  tx: Tx,
  removal: Pick<StoredRemoval, "receiverName">,
  number: string,
  except: Id<"removal-receipt"> | null,
  at: readonly string[],
): void {
  const used = getReceiptByNumber(tx, removal.receiverName, number);
  if (!used || used.id === except) return;
  const day = formatDay(dayOf(used.removedAt, requireScheme(tx).timeZone));
  throw new AppError(
    "receipt-number-used",
    { number: used.number, receiver: removal.receiverName, day },
    [...at, "number"],
  );
}

/** The receipt's own day, not before the removal's. */
export function requireReceiptDay(
  tx: Tx,
  ctx: Context,
  removal: Pick<StoredRemoval, "occurredAt">,
  day: EnterInput["day"],
  at: readonly string[],
): Instant {
  const occurredAt = requireDay(tx, ctx, day, at);
  const removed = dayOf(removal.occurredAt, requireScheme(tx).timeZone);
  if (day < removed) {
    throw new AppError("receipt-too-early", { day: formatDay(removed) }, [...at, "day"]);
  }
  return Math.max(occurredAt, removal.occurredAt) as Instant;
}

export function receiptDrafts(
  tx: Tx,
  removalActId: number,
  receiptId: Id<"removal-receipt">,
  occurredAt: Instant,
): Draft[] {
  return receiptEntries(listPassedOn(tx, removalActId)).map((lines) => ({
    kind: "receipt",
    occurredAt,
    subject: `removal-receipt:${receiptId}`,
    lines,
  }));
}

export function insertReceiptIn(
  tx: Tx,
  ctx: Context,
  row: {
    receiptId: Id<"removal-receipt">;
    removalId: Id<"removal">;
    number: string;
    receivedGrams: number;
    occurredAt: Instant;
    actId: number;
  },
): void {
  prepared(
    tx.client,
    `insert into removal_receipts (id, removal_id, number, received_grams, done_by, occurred_at, recorded_at, state,
       act_id) values (?, ?, ?, ?, ?, ?, ?, 'posted', ?)`,
  ).run(
    row.receiptId,
    row.removalId,
    row.number,
    row.receivedGrams,
    requirePerson(ctx),
    row.occurredAt,
    ctx.now,
    row.actId,
  );
}

export function setReceiptStateIn(
  tx: Tx,
  id: Id<"removal-receipt">,
  state: "undone" | "corrected",
  actId: number,
): void {
  prepared(tx.client, "update removal_receipts set state = ?, undone_act_id = ? where id = ?").run(
    state,
    actId,
    id,
  );
}
