/** What saving and correcting a step share: its draft, its rows, the lots that it fills. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import type { Draft } from "@/lib/ledger/commands/post";
import { requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import type { StepContent } from "../contract/steps";
import { lotForMaterialIn, type OpenLot } from "./lots";
import type { InputRead, Judged, OutputRead } from "./step-content";

export type Target = OpenLot & { materialId: number; grams: number; mpeMilligrams: number };

/**
 * The lots that outputs go to: readings of one material go to one lot.
 *
 * @param earlier lots that a corrected step filled: what is of the same material stays there
 */
export function findTargetsIn(
  tx: Tx,
  ctx: Context,
  outputs: readonly OutputRead[],
  earlier: ReadonlyMap<number, OpenLot> = new Map(),
): Target[] {
  const targets = new Map<number, Target>();
  for (const { materialId, weighed } of outputs) {
    let target = targets.get(materialId);
    if (!target) {
      const lot = earlier.get(materialId) ?? lotForMaterialIn(tx, ctx, materialId);
      target = { ...lot, materialId, grams: 0, mpeMilligrams: 0 };
      targets.set(materialId, target);
    }
    target.grams += weighed.netGrams;
    target.mpeMilligrams += weighed.mpeMilligrams;
  }
  return [...targets.values()];
}

/**
 * The draft of a step: out of its lots, into others, losses by cause, and the difference that is left.
 *
 * @param takes lines out of the input lots, and what they differ from what was weighed
 */
export function stepDraft(of: {
  stepId: Id<"step">;
  occurredAt: Instant;
  takes: { lines: Draft["lines"]; differenceGrams: number };
  targets: readonly Target[];
  outputs: readonly OutputRead[];
  judged: Judged;
}): Draft {
  const { targets, outputs, judged, takes } = of;
  const difference = judged.differenceGrams + takes.differenceGrams;
  const lines: Draft["lines"][number][] = [
    ...takes.lines,
    ...targets.map(({ holderId, materialId, grams, mpeMilligrams }) => {
      const first = outputs.find((output) => output.materialId === materialId)?.weighed;
      return {
        account: "lot" as const,
        holderId,
        materialId,
        grams,
        basis: first?.basis ?? null,
        scaleNumber: first?.scaleNumber ?? null,
        mpeMilligrams,
      };
    }),
    ...[...judged.losses].map(([cause, grams]) => ({ account: "loss" as const, cause, grams })),
  ];
  if (difference !== 0) lines.push({ account: "difference", grams: difference });
  return { kind: "step", occurredAt: of.occurredAt, subject: `step:${of.stepId}`, lines };
}

/** The rows of a step. */
export function insertStepIn(
  tx: Tx,
  ctx: Context,
  step: {
    stepId: Id<"step">;
    content: StepContent;
    occurredAt: Instant;
    inputs: readonly { read: InputRead; grams: number }[];
    outputs: readonly OutputRead[];
    targets: readonly Target[];
    judged: Judged;
    actId: number;
    corrects: Id<"step"> | null;
  },
): void {
  const { stepId, content, judged } = step;
  prepared(
    tx.client,
    `insert into steps (id, kind, minutes, input_grams, output_grams, loss_grams, tolerance_mg, act_id, corrects,
       done_by, occurred_at, recorded_at, state) values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, 'posted')`,
  ).run(
    stepId,
    content.kind,
    content.minutes,
    judged.inputGrams,
    judged.outputGrams,
    judged.lossGrams,
    judged.toleranceMilligrams,
    step.actId,
    step.corrects,
    requirePerson(ctx),
    step.occurredAt,
    ctx.now,
  );
  const input = prepared(
    tx.client,
    `insert into step_inputs (step_id, lot_id, grams, taking, scale_id, gross_mg, less_mg)
     values (?, ?, ?, ?, ?, ?, ?)`,
  );
  for (const { read, grams } of step.inputs) {
    input.run(
      stepId,
      read.lot.lotId,
      grams,
      read.taking,
      read.weighed?.scaleId ?? null,
      read.grossMilligrams,
      read.lessMilligrams,
    );
  }
  const lots = new Map(step.targets.map((target) => [target.materialId, target.lotId]));
  const output = prepared(
    tx.client,
    `insert into step_outputs (step_id, seq, lot_id, grams, scale_id, gross_mg, tare_mg)
     values (?, ?, ?, ?, ?, ?, ?)`,
  );
  step.outputs.forEach(({ materialId, weighed }, at) => {
    output.run(
      stepId,
      at + 1,
      lots.get(materialId),
      weighed.netGrams,
      weighed.scaleId,
      weighed.grossMilligrams,
      weighed.tareMilligrams,
    );
  });
  const loss = prepared(
    tx.client,
    "insert into step_losses (step_id, cause, grams) values (?, ?, ?)",
  );
  for (const [cause, grams] of judged.losses) loss.run(stepId, cause, grams);
}
