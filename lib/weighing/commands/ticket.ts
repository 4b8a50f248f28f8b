/** The two ways in which a ticket is kept: in the ledger, or for review. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { assignPointIn, moveBagIn } from "@/lib/bags/commands/move-bag";
import type { Bag } from "@/lib/bags/queries";
import type { PersonId, PointId, WeighInId } from "@/lib/core/ids";
import type { ReadingInput } from "@/lib/core/schemas";
import type { Instant } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { postAct } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import type { Context } from "@/lib/platform/context";
import type { Tx } from "@/lib/platform/database";
import type { Scale } from "@/lib/scales/queries/scales";
import { isBelowMinimum, mpeOf } from "@/lib/scales/rules/reading";
import type { WeighInInput, WeighInReceipt } from "../contract/weigh-ins";
import type { WeighIn } from "../queries/weigh-ins";
import type { materialOf } from "../rules";
import { weighInDrafts } from "./drafts";
import { insertWeighIn } from "./insert";

/** A receipt as it is kept for good: with ids of people, never their names. */
export type KeptReceipt =
  | Exclude<WeighInReceipt, { kind: "kept-for-review" }>
  | (Omit<Extract<WeighInReceipt, { kind: "kept-for-review" }>, "earlier"> & {
      earlier: { doneBy: string; when: number; netGrams: number };
    });

/** A ticket that passed the rules. */
export type Ticket = {
  ctx: Context;
  doneBy: PersonId;
  input: WeighInInput;
  bag: Bag;
  scale: Scale;
  readings: ReadingInput[];
  basis: "checked" | "unchecked";
  pointId: PointId;
  occurredAt: Instant;
  netGrams: number;
};

/** Keeps the second reading of a bag, outside the ledger. */
export function keepForReview(tx: Tx, ticket: Ticket, earlier: WeighIn): KeptReceipt {
  const { ctx, bag, netGrams } = ticket;
  const id = insertWeighIn(tx, { ...rowOf(ticket), state: "for-review", lotId: null, actId: null });
  recordAudit(tx, ctx, {
    action: "weighing.keep-for-review",
    subjectKind: "weigh-in",
    subjectId: id,
    fields: { bagId: bag.id, netGrams, earlier: earlier.id },
  });
  return {
    kind: "kept-for-review",
    weighInId: id,
    code: bag.code,
    netGrams,
    undoUntil: undoUntil(ctx.now),
    earlier: { doneBy: earlier.doneBy, when: earlier.recordedAt, netGrams: earlier.netGrams },
  };
}

/** Posts a ticket to the ledger and moves its bag on. */
export function postTicket(
  tx: Tx,
  ticket: Ticket,
  material: ReturnType<typeof materialOf>,
  tareChanges: Extract<WeighInReceipt, { kind: "posted" }>["tareChanges"],
): KeptReceipt {
  const { ctx, doneBy, input, bag, netGrams } = ticket;
  const row = rowOf(ticket);
  if (bag.pointId === null) assignPointIn(tx, bag.id, ticket.pointId);
  moveBagIn(tx, bag.id, "weighed", ctx.now);
  const { drafts, lot } = weighInDrafts(
    tx,
    ctx,
    { ...row, weighInId: row.id, code: bag.code, scaleNumber: ticket.scale.number },
    material,
  );
  if (lot) moveBagIn(tx, bag.id, "sorted", ctx.now);
  const { actId } = postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, drafts);
  const id = insertWeighIn(tx, { ...row, state: "posted", lotId: lot?.lotId ?? null, actId });
  recordAudit(tx, ctx, {
    action: "weighing.record",
    subjectKind: "weigh-in",
    subjectId: id,
    fields: {
      bagId: bag.id,
      netGrams,
      lotId: lot?.lotId ?? null,
      tareChanges: tareChanges.length,
      confirmed: input.confirmed.join(" "),
    },
    actId,
  });
  return {
    kind: "posted",
    weighInId: id,
    code: bag.code,
    netGrams,
    recordedAt: ctx.now,
    undoUntil: undoUntil(ctx.now),
    belowMinimum: row.belowMinimum,
    tareChanges,
    lot: lot && {
      id: lot.lotId,
      number: lot.number,
      grams: heldBy(tx, lot.holderId, lot.materialId),
    },
    before: { state: bag.state, since: bag.stateSince, pointId: bag.pointId },
  };
}

function rowOf(ticket: Ticket) {
  const { ctx, input, scale, readings } = ticket;
  return {
    id: input.requestId as WeighInId,
    bagId: ticket.bag.id,
    pointId: ticket.pointId,
    scaleId: scale.id,
    doneBy: ticket.doneBy,
    occurredAt: ticket.occurredAt,
    recordedAt: ctx.now,
    netGrams: ticket.netGrams,
    mpeMilligrams: mpeOf(scale, readings),
    basis: ticket.basis,
    belowMinimum: isBelowMinimum(scale, readings),
    condition: input.condition,
    polymer: input.polymer,
    kind: input.kind,
    colourCode: input.colourCode,
    oneKind: input.oneKind,
    readings,
  };
}
