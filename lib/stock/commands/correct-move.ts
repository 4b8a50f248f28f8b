/** Putting a move right later: one act, whatever became of the lots since. */
import "server-only";
import type * as z from "zod";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import { correctAct } from "@/lib/ledger/commands/post";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { correctMoveEndpoint, CorrectMoveInput } from "../contract/moves";
import { bookGrams, lotOf, type LotRecord } from "../queries/lot-record";
import { requireMove, type StoredMove } from "../queries/moves";
import { requireColourInUse } from "../queries/palette";
import type { IdentifyMethod } from "../terms";
import { lotForMaterialIn } from "./lots";
import { insertMoveIn, moveDraft, requireMergeable } from "./move-lot";

type Replacement = { to: LotRecord; grams: number; method: IdentifyMethod | null };

/**
 * Takes a move back and posts what should have stood there. It always goes through; what a lot no longer holds is
 * settled as difference, and the answer names the later uses.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`; for another lot `unknown-lot`, `same-lot`,
 *   `lots-differ`; `unknown-colour`
 */
export function correctMove(
  ctx: Context,
  input: CorrectMoveInput,
): z.output<typeof correctMoveEndpoint.output> {
  allow(ctx, "stock.review");
  const person = requirePerson(ctx);
  return once<z.output<typeof correctMoveEndpoint.output>>(
    ctx,
    `POST /api/lot-moves/${input.id}/correct`,
    input.requestId,
    (tx) => {
      const move = requireMove(tx, input.id);
      if (move.state === "undone") throw new AppError("undone-already");
      if (move.state === "corrected") throw new AppError("corrected-already");
      const later = listLaterUses(tx, move.actId);
      const from = lotOf(tx, move.fromLotId);
      const replacement = replacementIn(tx, ctx, move, from, input);
      const replacementId = replacement ? (input.requestId as Id<"lot-move">) : null;
      const drafts =
        replacement && replacementId
          ? [
              {
                ...moveDraft(
                  {
                    moveId: replacementId,
                    kind: move.kind,
                    to: replacement.to,
                    occurredAt: move.occurredAt,
                    weighed: null,
                  },
                  {
                    grams: replacement.grams,
                    lines: [
                      {
                        account: "lot",
                        holderId: from.holderId,
                        materialId: from.materialId,
                        grams: -replacement.grams,
                      },
                    ],
                    differenceGrams: 0,
                  },
                ),
                note: input.reason,
              },
            ]
          : [];
      const { actId } = correctAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: move.actId, subject: `lot-move:${move.id}`, note: input.reason },
        drafts,
      );
      prepared(
        tx.client,
        "update lot_moves set state = 'corrected', undone_act_id = ? where id = ?",
      ).run(actId, move.id);
      if (replacement && replacementId) {
        insertMoveIn(tx, ctx, {
          moveId: replacementId,
          kind: move.kind,
          from,
          to: replacement.to,
          grams: replacement.grams,
          method: replacement.method,
          scaleId: null,
          occurredAt: move.occurredAt,
          actId,
          corrects: move.id,
        });
      }
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "lot-move",
        subjectId: move.id,
        replacementId,
        reason: input.reason,
        doneBy: person,
        actId,
      });
      const to = replacement?.to ?? lotOf(tx, move.toLotId);
      recordAudit(tx, ctx, {
        action: "stock.correct-move",
        subjectKind: "lot-move",
        subjectId: move.id,
        fields: {
          fromLotId: from.lotId,
          toLotId: to.lotId,
          gramsBefore: move.grams,
          grams: replacement?.grams ?? null,
          laterUses: later.count,
        },
        personal: { reason: input.reason },
        actId,
      });
      return {
        moveId: move.id,
        replacementId,
        from: { number: from.number, heldGrams: bookGrams(tx, from) },
        to: { number: to.number, heldGrams: bookGrams(tx, to) },
        later,
      };
    },
  );
}

function replacementIn(
  tx: Tx,
  ctx: Context,
  move: StoredMove,
  from: LotRecord,
  { replacement }: CorrectMoveInput,
): Replacement | null {
  if (!replacement) return null;
  const { grams, toNumber, identity } = replacement;
  const same: Replacement = { to: lotOf(tx, move.toLotId), grams, method: move.method };
  if (move.kind === "merge" && toNumber !== null) {
    return { ...same, to: requireMergeable(tx, from, toNumber) };
  }
  if (move.kind !== "identify" || identity === null) return same;
  const { method, ...what } = identity;
  const { to } = same;
  const unchanged =
    to.polymer === what.polymer && to.kind === what.kind && to.colourCode === what.colourCode;
  if (unchanged) return { ...same, method };
  if (what.colourCode !== from.colourCode && what.colourCode !== to.colourCode) {
    requireColourInUse(tx, what.colourCode, ["replacement", "identity", "colourCode"]);
  }
  const materialId = ensureMaterial(tx, { ...what, form: from.form, wash: from.wash });
  return { to: lotOf(tx, lotForMaterialIn(tx, ctx, materialId).lotId), grams, method };
}
