/** Taking a step back while nothing has been built on it. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { LotId } from "@/lib/core/ids";
import { judgeUndo } from "@/lib/core/undo";
import { reverseAct } from "@/lib/ledger/commands/post";
import { takenSince } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { undoStepEndpoint, UndoStepInput } from "../contract/steps";
import { requireStep } from "../queries/steps";
import { reopenLotIn } from "./close-lot";

/**
 * Takes a step back: the exact negative of its entry. Lots that it closed are open again unless the next ones have
 * opened; lots that it opened stay, empty, because their labels may be printed already. A count on the spot that it
 * asked for stands: somebody weighed what was there.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, `undo-of-correction`, `undo-not-yours`,
 *   `undo-too-late`, `undo-used-since`
 */
export function undoStep(
  ctx: Context,
  input: UndoStepInput,
): z.output<typeof undoStepEndpoint.output> {
  allow(ctx, "steps.record");
  const person = requirePerson(ctx);
  return once<z.output<typeof undoStepEndpoint.output>>(
    ctx,
    `POST /api/steps/${input.id}/undo`,
    input.requestId,
    (tx) => {
      const step = requireStep(tx, input.id);
      const verdict = judgeUndo(step, person, ctx.now);
      if (verdict !== "fine") throw new AppError(verdict);
      // Taking a correction back would not bring back what it corrected.
      if (step.corrects !== null) throw new AppError("undo-of-correction");
      if (takenSince(tx, step.actId)) throw new AppError("undo-used-since");
      const { actId } = reverseAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: step.actId, subject: `step:${step.id}` },
      );
      prepared(tx.client, "update steps set state = 'undone', undone_act_id = ? where id = ?").run(
        actId,
        step.id,
      );
      const lots = prepared(
        tx.client,
        "select l.id as lotId, l.number from step_inputs i join lots l on l.id = i.lot_id where i.step_id = ? order by l.number",
      ).all(step.id) as { lotId: LotId; number: number }[];
      for (const { lotId } of lots) reopenLotIn(tx, lotId, step.recordedAt, "step");
      recordAudit(tx, ctx, {
        action: "steps.undo",
        subjectKind: "step",
        subjectId: step.id,
        fields: { undoneActId: actId },
        actId,
      });
      return { stepId: step.id, lots: lots.map(({ number }) => number) };
    },
  );
}
