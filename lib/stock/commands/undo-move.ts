/** Taking a move back while nothing has been built on it. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { judgeUndo } from "@/lib/core/undo";
import { reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { undoMoveEndpoint, UndoMoveInput } from "../contract/moves";
import { bookGrams, lotOf } from "../queries/lot-record";
import { requireMove } from "../queries/moves";
import { reopenLotIn } from "./close-lot";

/**
 * Takes a move back: the exact negative of its entry. A lot that it opened stays, empty, because its label may be
 * printed already; one that it closed is open again unless the next one has opened.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, `undo-of-correction`, `undo-not-yours`,
 *   `undo-too-late`, `undo-used-since`
 */
export function undoMove(
  ctx: Context,
  input: UndoMoveInput,
): z.output<typeof undoMoveEndpoint.output> {
  allow(ctx, "stock.identify");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoMoveEndpoint.output>>(
    ctx,
    `POST /api/lot-moves/${input.id}/undo`,
    input.requestId,
    (tx) => {
      const move = requireMove(tx, input.id);
      const verdict = judgeUndo(move, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      // Taking a correction back would not bring back what it corrected.
      if (move.corrects !== null) throw new AppError("undo-of-correction");
      if (takenSince(tx, move.actId)) throw new AppError("undo-used-since");
      const { actId } = reverseAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: move.actId, subject: `lot-move:${move.id}` },
      );
      prepared(
        tx.client,
        "update lot_moves set state = 'undone', undone_act_id = ? where id = ?",
      ).run(actId, move.id);
      reopenLotIn(tx, move.fromLotId, move.recordedAt, move.kind === "merge" ? "merged" : "empty");
      const [from, to] = [lotOf(tx, move.fromLotId), lotOf(tx, move.toLotId)];
      recordAudit(tx, ctx, {
        action: "stock.undo-move",
        subjectKind: "lot-move",
        subjectId: move.id,
        fields: { fromLotId: from.lotId, toLotId: to.lotId, grams: move.grams },
        actId,
      });
      return {
        moveId: move.id,
        from: { number: from.number, heldGrams: bookGrams(tx, from) },
        to: { number: to.number, heldGrams: bookGrams(tx, to) },
      };
    },
  );
}
