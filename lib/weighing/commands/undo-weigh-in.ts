import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { restoreBagIn, type BagBefore } from "@/lib/bags/commands/move-bag";
import { getBagById } from "@/lib/bags/queries";
import { AppError } from "@/lib/core/errors";
import type { PersonId, PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { mayStillUndo } from "@/lib/core/undo";
import { reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import {
  weighInReceiptSchema,
  type UndoWeighInInput,
  type UndoWeighInReceipt,
} from "../contract/weigh-ins";
import { getWeighIn, type WeighIn } from "../queries/weigh-ins";

/**
 * Takes a weigh-in back within ten minutes of its recording, by whoever saved it. The act is reversed and the
 * bag is again what it was before; a second reading that was only kept for review is set aside.
 *
 * @throws AppError `not-found`, `undo-not-yours`, `undone-already`, `undo-too-late`, `undo-used-since` once
 *   something was taken from the bag or its lot
 */
export function undoWeighIn(ctx: Context, input: UndoWeighInInput): UndoWeighInReceipt {
  allow(ctx, "weighing.record");
  const person = requirePerson(ctx);
  return once(ctx, `POST /api/weigh-ins/${input.id}/undo`, input.requestId, (tx) => {
    const weighIn = requireUndoable(tx, ctx, person, input);
    if (weighIn.actId === null) return discard(tx, ctx, weighIn);
    if (takenSince(tx, weighIn.actId)) throw new AppError("undo-used-since");
    const before = bagBefore(tx, weighIn);
    const { actId } = reverseAct(
      tx,
      { now: ctx.now, doneBy: person, sentBy: person, device: null },
      { actId: weighIn.actId, subject: `weigh-in:${weighIn.id}` },
    );
    prepared(
      tx.client,
      "update weigh_ins set state = 'undone', undone_act_id = ? where id = ?",
    ).run(actId, weighIn.id);
    restoreBagIn(tx, weighIn.bagId, before);
    recordAudit(tx, ctx, {
      action: "weighing.undo",
      subjectKind: "weigh-in",
      subjectId: weighIn.id,
      fields: { bagId: weighIn.bagId, netGrams: weighIn.netGrams },
      actId,
    });
    return { kind: "undone", code: weighIn.code, bagState: before.state };
  });
}

function requireUndoable(
  tx: Tx,
  ctx: Context,
  person: PersonId,
  { id }: UndoWeighInInput,
): WeighIn {
  const weighIn = getWeighIn(tx, id);
  if (!weighIn) throw new AppError("not-found");
  if (weighIn.doneBy !== person) throw new AppError("undo-not-yours");
  if (weighIn.state === "undone" || weighIn.state === "discarded")
    throw new AppError("undone-already");
  if (weighIn.state === "corrected") throw new AppError("corrected-already");
  // Taking a correction back would not bring back what it corrected.
  if (weighIn.corrects !== null) throw new AppError("undo-of-correction");
  if (!mayStillUndo(weighIn.recordedAt, ctx.now)) throw new AppError("undo-too-late");
  return weighIn;
}

function discard(tx: Tx, ctx: Context, weighIn: WeighIn): UndoWeighInReceipt {
  prepared(tx.client, "update weigh_ins set state = 'discarded' where id = ?").run(weighIn.id);
  recordAudit(tx, ctx, {
    action: "weighing.discard",
    subjectKind: "weigh-in",
    subjectId: weighIn.id,
    fields: { bagId: weighIn.bagId, netGrams: weighIn.netGrams },
  });
  const bag = getBagById(tx, weighIn.bagId);
  if (!bag) throw new AppError("not-found");
  return { kind: "discarded", code: weighIn.code, bagState: bag.state };
}

/** The weigh-in's own receipt, which is kept for good, says what its bag was before. */
export function bagBefore(tx: Tx, weighIn: Pick<WeighIn, "id">): BagBefore {
  const answer = prepared(tx.client, "select answer from receipts where request_id = ?")
    .pluck()
    .get(weighIn.id) as string | undefined;
  const receipt = weighInReceiptSchema.parse(JSON.parse(answer ?? "null"));
  if (receipt.kind !== "posted") throw new Error(`weigh-in ${weighIn.id} has no posted receipt`);
  const { state, since, pointId } = receipt.before;
  return { state, since: since as Instant, pointId: pointId as PointId | null };
}
