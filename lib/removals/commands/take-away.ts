/** Rejects or stock leave the shed; and taking that back while nothing has been built on it. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId } from "@/lib/core/ids";
import { judgeUndo } from "@/lib/core/undo";
import { postAct, reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { closeIfEmptyIn, reopenLotIn } from "@/lib/stock/commands/close-lot";
import type { RemovalReceipt, TakeAwayInput, undoRemovalEndpoint } from "../contract/removals";
import { getLiveReceipt, getStoredRemoval } from "../queries/stored";
import { insertRemovalIn } from "./insert";
import { planRemoval } from "./plan";

/**
 * Takes away what was weighed, stated or emptied: one act. More than the book holds is asked about once where the
 * reading cannot explain it; what is over or missing is difference.
 *
 * @throws AppError what {@link planRemoval} refuses
 */
export function takeAway(ctx: Context, input: TakeAwayInput): RemovalReceipt {
  allow(ctx, "removals.record");
  const person = requirePerson(ctx);
  return once<RemovalReceipt>(ctx, "POST /api/removals", input.requestId, (tx) => {
    const id = input.requestId as Id<"removal">;
    const planned = planRemoval(tx, ctx, input, null);
    const { actId } = postAct(
      tx,
      { now: ctx.now, doneBy: person, sentBy: person, device: null },
      planned.drafts(`removal:${id}`),
    );
    const receipt = insertRemovalIn(tx, ctx, planned, {
      id,
      noteNumber: input.noteNumber,
      corrects: null,
      actId,
    });
    for (const { lotId } of planned.lots) closeIfEmptyIn(tx, lotId, ctx.now);
    const { source, route, grams, differenceGrams, basis } = receipt;
    recordAudit(tx, ctx, {
      action: "removals.record",
      subjectKind: "removal",
      subjectId: id,
      fields: {
        source,
        route,
        destinationId: input.destinationId,
        grams,
        differenceGrams,
        basis,
        confirmedAbove: input.confirmedAbove,
      },
      actId,
    });
    return receipt;
  });
}

/**
 * Takes a removal back: what left is in its place again.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, `undo-not-yours`, `undo-too-late`,
 *   `undo-of-correction`, `removal-has-receipt`, `undo-used-since`
 */
export function undoRemoval(
  ctx: Context,
  input: z.output<typeof undoRemovalEndpoint.input>,
): z.output<typeof undoRemovalEndpoint.output> {
  allow(ctx, "removals.record");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoRemovalEndpoint.output>>(
    ctx,
    `POST /api/removals/${input.id}/undo`,
    input.requestId,
    (tx) => {
      const removal = getStoredRemoval(tx, input.id);
      if (!removal) throw new AppError("not-found");
      const verdict = judgeUndo(removal, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      if (removal.corrects !== null) throw new AppError("undo-of-correction");
      const receipt = getLiveReceipt(tx, removal.id);
      if (receipt) throw new AppError("removal-has-receipt", { number: receipt.number });
      if (takenSince(tx, removal.actId)) throw new AppError("undo-used-since");
      const { actId } = reverseAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: removal.actId, subject: `removal:${removal.id}` },
      );
      prepared(
        tx.client,
        "update removals set state = 'undone', undone_act_id = ? where id = ?",
      ).run(actId, removal.id);
      for (const lotId of listRemovedLots(tx, removal.id)) {
        reopenLotIn(tx, lotId, removal.recordedAt, "empty");
      }
      recordAudit(tx, ctx, {
        action: "removals.undo",
        subjectKind: "removal",
        subjectId: removal.id,
        fields: { grams: removal.grams },
        actId,
      });
      return { id: removal.id, state: "undone" };
    },
  );
}

/** The lots that a removal took from. */
function listRemovedLots(tx: Tx, removalId: Id<"removal">): LotId[] {
  return prepared(tx.client, "select lot_id from removal_lots where removal_id = ?")
    .pluck()
    .all(removalId) as LotId[];
}
