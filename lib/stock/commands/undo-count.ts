/** Taking a count back while nothing has been built on it. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { judgeUndo } from "@/lib/core/undo";
import { reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type * as z from "zod";
import type { undoCountEndpoint, UndoCountInput } from "../contract/counts";
import { requireCount } from "../queries/counts";
import { bookGrams, lotOf } from "../queries/lot-record";
import { reopenLotIn } from "./close-lot";

/**
 * Takes a count back: the exact negative of its entry; a lot that it closed is open again unless the next one has
 * opened.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, `undo-of-correction`, `undo-not-yours`,
 *   `undo-too-late`, `undo-used-since`
 */
export function undoCount(
  ctx: Context,
  input: UndoCountInput,
): z.output<typeof undoCountEndpoint.output> {
  allow(ctx, "stock.count");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoCountEndpoint.output>>(
    ctx,
    `POST /api/counts/${input.id}/undo`,
    input.requestId,
    (tx) => {
      const count = requireCount(tx, input.id);
      const verdict = judgeUndo(count, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      // Taking a correction back would not bring back what it corrected.
      if (count.corrects !== null) throw new AppError("undo-of-correction");
      if (count.actId !== null && takenSince(tx, count.actId)) {
        throw new AppError("undo-used-since");
      }
      const undone =
        count.actId === null
          ? null
          : reverseAct(
              tx,
              { now: ctx.now, doneBy: person, sentBy: person, device: null },
              { actId: count.actId, subject: `count:${count.id}` },
            ).actId;
      prepared(tx.client, "update counts set state = 'undone', undone_act_id = ? where id = ?").run(
        undone,
        count.id,
      );
      reopenLotIn(tx, count.lotId, count.recordedAt, "empty");
      const lot = lotOf(tx, count.lotId);
      recordAudit(tx, ctx, {
        action: "stock.undo-count",
        subjectKind: "count",
        subjectId: count.id,
        fields: { lotId: count.lotId, undoneActId: undone },
        actId: undone,
      });
      return { countId: count.id, number: lot.number, heldGrams: bookGrams(tx, lot) };
    },
  );
}
