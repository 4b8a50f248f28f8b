/** Putting a step right later: one act, whatever became of its lots since. */
import "server-only";
import type * as z from "zod";
import { insertCorrectionIn, recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { correctAct, type Draft } from "@/lib/ledger/commands/post";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import type { correctStepEndpoint, CorrectStepInput, StepContent } from "../contract/steps";
import { requireStep, type StoredStep } from "../queries/steps";
import { closeLotIn } from "./close-lot";
import type { OpenLot } from "./lots";
import { findTargetsIn, insertStepIn, stepDraft } from "./post-step";
import {
  judgeContent,
  readInputs,
  readOutputs,
  requireShape,
  type InputRead,
} from "./step-content";

/**
 * Takes a step back and posts what should have stood there. What went in is not limited by what the book holds: what
 * a lot no longer has is settled as difference. The answer names the later uses.
 *
 * @throws AppError `not-found`, `undone-already`, `corrected-already`, and for the replacement what `saveStep` throws
 *   of lots, materials and readings
 */
export function correctStep(
  ctx: Context,
  input: CorrectStepInput,
): z.output<typeof correctStepEndpoint.output> {
  allow(ctx, "steps.record");
  const person = requirePerson(ctx);
  return once<z.output<typeof correctStepEndpoint.output>>(
    ctx,
    `POST /api/steps/${input.id}/correct`,
    input.requestId,
    (tx) => {
      const step = requireStep(tx, input.id);
      if (step.state === "undone") throw new AppError("undone-already");
      if (step.state === "corrected") throw new AppError("corrected-already");
      const later = listLaterUses(tx, step.actId);
      const replacementId = input.replacement ? (input.requestId as Id<"step">) : null;
      const replacement =
        input.replacement && replacementId
          ? prepareIn(tx, ctx, step, input.replacement, replacementId)
          : null;
      const { actId } = correctAct(
        tx,
        { now: ctx.now, doneBy: person, sentBy: person, device: null },
        { actId: step.actId, subject: `step:${step.id}`, note: input.reason },
        replacement ? [{ ...replacement.draft, note: input.reason }] : [],
      );
      prepared(
        tx.client,
        "update steps set state = 'corrected', undone_act_id = ? where id = ?",
      ).run(actId, step.id);
      replacement?.insert(actId);
      insertCorrectionIn(tx, ctx, {
        id: input.requestId,
        subjectKind: "step",
        subjectId: step.id,
        replacementId,
        reason: input.reason,
        doneBy: person,
        actId,
      });
      recordAudit(tx, ctx, {
        action: "steps.correct",
        subjectKind: "step",
        subjectId: step.id,
        fields: {
          inputBefore: step.inputGrams,
          outputBefore: step.outputGrams,
          inputGrams: replacement?.inputGrams ?? null,
          outputGrams: replacement?.outputGrams ?? null,
          laterUses: later.count,
        },
        personal: { reason: input.reason },
        actId,
      });
      return { stepId: step.id, replacementId, later };
    },
  );
}

type Prepared = {
  draft: Draft;
  inputGrams: number;
  outputGrams: number;
  insert: (actId: number) => void;
};

function prepareIn(
  tx: Tx,
  ctx: Context,
  step: StoredStep,
  content: StepContent,
  stepId: Id<"step">,
): Prepared {
  const occurredAt = content.occurredAt <= ctx.now ? content.occurredAt : step.occurredAt;
  const inputs = readInputs(tx, content, occurredAt, true).map((read) => ({
    ...read,
    grams: read.grams ?? takenBefore(tx, step, read),
  }));
  const shape = requireShape(content.kind, inputs);
  const outputs = readOutputs(tx, content, inputs, shape, occurredAt);
  const judged = judgeContent(tx, content, inputs, outputs, shape.damp);
  for (const { lot } of inputs) closeLotIn(tx, lot.lotId, ctx.now, "step");
  const targets = findTargetsIn(tx, ctx, outputs, lotsFilled(tx, step));
  const takes = {
    lines: inputs.map(({ lot, grams }) => ({
      account: "lot" as const,
      holderId: lot.holderId,
      materialId: lot.materialId,
      grams: -grams,
    })),
    differenceGrams: 0,
  };
  return {
    draft: stepDraft({ stepId, occurredAt, takes, targets, outputs, judged }),
    inputGrams: judged.inputGrams,
    outputGrams: judged.outputGrams,
    insert: (actId) =>
      insertStepIn(tx, ctx, {
        stepId,
        content,
        occurredAt,
        inputs: inputs.map((read) => ({ read, grams: read.grams })),
        outputs,
        targets,
        judged,
        actId,
        corrects: step.id,
      }),
  };
}

/** "All of it" in a correction is what the step took of that lot. */
function takenBefore(tx: Tx, step: StoredStep, { lot }: InputRead): number {
  const grams = prepared(
    tx.client,
    "select grams from step_inputs where step_id = ? and lot_id = ?",
  )
    .pluck()
    .get(step.id, lot.lotId) as number | undefined;
  if (grams === undefined) throw new AppError("lot-empty", { number: lot.number }, ["inputs"]);
  return grams;
}

/** The lots that the step filled, by material. */
function lotsFilled(tx: Tx, step: StoredStep): Map<number, OpenLot> {
  const rows = prepared(
    tx.client,
    `select distinct l.material_id as materialId, l.id as lotId, l.holder_id as holderId, l.number
       from step_outputs o join lots l on l.id = o.lot_id where o.step_id = ?`,
  ).all(step.id) as (Omit<OpenLot, "opened"> & { materialId: number })[];
  return new Map(
    rows.map(({ materialId, ...lot }): [number, OpenLot] => [
      materialId,
      { ...lot, opened: false },
    ]),
  );
}
