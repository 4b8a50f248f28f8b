/** Washing, drying, shredding: one act in the ledger, whole or not at all. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { undoUntil } from "@/lib/core/undo";
import { postAct } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import type { Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { toleranceOf } from "@/lib/scales/rules/loads";
import type { SaveStepInput, StepReceipt } from "../contract/steps";
import { doneAt } from "../rules/counting";
import { closeLotIn } from "./close-lot";
import { findTargetsIn, insertStepIn, stepDraft } from "./post-step";
import {
  judgeContent,
  readInputs,
  readOutputs,
  requireShape,
  type InputRead,
} from "./step-content";
import { takeFromLotIn, type TakenFromLot } from "./take";

/**
 * Saves a step. Every open lot that it starts from closes, and the next opens by itself.
 *
 * @throws AppError `unknown-lot`, `lot-twice`, `lot-empty`, `lot-holds-less`, `weighed-back-more`,
 *   `step-polymers-differ`, `step-forms-differ`, `step-output-kind`, `step-output-colour`, `unknown-colour`,
 *   `step-beyond-tolerance`, `step-output-above-input`, and what a weighing throws
 */
export function saveStep(ctx: Context, input: SaveStepInput): StepReceipt {
  allow(ctx, "steps.record");
  const doneBy = requirePerson(ctx);
  return once<StepReceipt>(ctx, "POST /api/steps", input.requestId, (tx) => {
    const stepId = input.requestId as Id<"step">;
    const claimed = input.occurredAt <= ctx.now ? input.occurredAt : ctx.now;
    const inputs = readInputs(tx, input, claimed, false);
    const occurredAt = doneAt(claimed, youngest(inputs), ctx.now);
    const shape = requireShape(input.kind, inputs);
    const outputs = readOutputs(tx, input, inputs, shape, occurredAt);
    const taken = takeAllIn(tx, ctx, inputs, occurredAt, input.reservedToo ?? false);
    const judged = judgeContent(tx, input, withGrams(inputs, taken), outputs, shape.damp);

    const closed = inputs.filter(({ lot }) => closeLotIn(tx, lot.lotId, ctx.now, "step"));
    const targets = findTargetsIn(tx, ctx, outputs);
    const takes = {
      lines: taken.flatMap(({ lines }) => lines),
      differenceGrams: taken.reduce((sum, { differenceGrams }) => sum + differenceGrams, 0),
    };
    const draft = stepDraft({ stepId, occurredAt, takes, targets, outputs, judged });
    const { actId } = postAct(tx, { now: ctx.now, doneBy, sentBy: doneBy, device: null }, [draft]);
    insertStepIn(tx, ctx, {
      stepId,
      content: input,
      occurredAt,
      inputs: inputs.map((read, at) => ({ read, grams: taken[at]?.grams ?? 0 })),
      outputs,
      targets,
      judged,
      actId,
      corrects: null,
    });
    recordAudit(tx, ctx, {
      action: "steps.save",
      subjectKind: "step",
      subjectId: stepId,
      fields: {
        kind: input.kind,
        inputGrams: judged.inputGrams,
        outputGrams: judged.outputGrams,
        lossGrams: judged.lossGrams,
        differenceGrams: judged.differenceGrams,
        judged: judged.verdict.kind,
        from: inputs.map(({ lot }) => lot.number).join(" "),
        to: targets.map(({ number }) => number).join(" "),
        counts: taken.flatMap(({ countId }) => countId ?? []).join(" "),
      },
      actId,
    });
    return {
      stepId,
      kind: input.kind,
      inputGrams: judged.inputGrams,
      outputGrams: judged.outputGrams,
      lossGrams: judged.lossGrams,
      differenceGrams: judged.differenceGrams,
      outputs: targets.map(({ number, opened, grams, holderId, materialId }) => ({
        number,
        opened,
        grams,
        heldGrams: heldBy(tx, holderId, materialId),
      })),
      closed: closed.map(({ lot }) => lot.number),
      recordedAt: ctx.now,
      undoUntil: undoUntil(ctx.now),
    };
  });
}

/** A step cannot have begun before the last of its lots was there. */
function youngest(inputs: readonly InputRead[]): Instant {
  return inputs.reduce<Instant>(
    (last, { lot }) => (lot.openedAt > last ? lot.openedAt : last),
    0 as Instant,
  );
}

function takeAllIn(
  tx: Tx,
  ctx: Context,
  inputs: readonly InputRead[],
  occurredAt: Instant,
  reservedToo: boolean,
): TakenFromLot[] {
  return inputs.map((read, at) =>
    takeFromLotIn(tx, ctx, {
      lot: read.lot,
      grams: read.grams,
      toleranceMilligrams: read.loads.length > 0 ? toleranceOf(read.loads) : 0,
      all: read.all,
      weighed: read.weighed,
      left: read.left,
      reservedToo,
      occurredAt,
      path: ["inputs", at],
    }),
  );
}

/** Inputs with the grams that were really taken: "all of it" is what the book held. */
function withGrams(inputs: readonly InputRead[], taken: readonly TakenFromLot[]): InputRead[] {
  return inputs.map((read, at) => ({ ...read, grams: taken[at]?.grams ?? read.grams }));
}
