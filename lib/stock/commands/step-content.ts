/** Reading what a step sends: each input with its lot and readings, each output with its material, what was lost. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { formatKg, formatMilligrams } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { ensureMaterial } from "@/lib/ledger/commands/define";
import type { LossCause } from "@/lib/ledger/terms";
import type { Tx } from "@/lib/platform/database";
import { toleranceOf, type Load } from "@/lib/scales/rules/loads";
import type { StepContent, StepInput } from "../contract/steps";
import { bookGrams, requireLot, type LotRecord } from "../queries/lot-record";
import { requireColourInUse } from "../queries/palette";
import { readOne, readWeighed, type Weighed } from "../queries/weighed";
import { judgeStep, outputKind, shapeOf, type StepVerdict } from "../rules/steps";
import type { Taking } from "../terms";

export type InputRead = {
  lot: LotRecord;
  /** null: everything that the book holds, not weighed. */
  grams: number | null;
  all: boolean;
  taking: Taking;
  weighed: Weighed | null;
  /** As the row keeps it: the reading as taken or before, and what was taken off it. */
  grossMilligrams: number | null;
  lessMilligrams: number | null;
  loads: Load[];
  left: StepInput["count"];
};

export type OutputRead = { materialId: number; weighed: Weighed };

type Path = readonly (string | number)[];

/**
 * @param mayState a correction may give grams that no scale showed
 * @throws AppError `unknown-lot`, `lot-twice`, `weighed-back-more`, `stated-in-correction`, and what a weighing throws
 */
export function readInputs(
  tx: Tx,
  content: Pick<StepContent, "inputs">,
  occurredAt: Instant,
  mayState: boolean,
): InputRead[] {
  const seen = new Set<number>();
  return content.inputs.map((input, at) => {
    const path = ["inputs", at];
    const lot = requireLot(tx, input.number, [...path, "number"]);
    if (seen.has(lot.number)) {
      throw new AppError("lot-twice", { number: lot.number }, [...path, "number"]);
    }
    seen.add(lot.number);
    return { lot, left: input.count, ...readAmount(tx, input.amount, occurredAt, path, mayState) };
  });
}

function readAmount(
  tx: Tx,
  amount: StepInput["amount"],
  occurredAt: Instant,
  path: Path,
  mayState: boolean,
): Omit<InputRead, "lot" | "left"> {
  const unread = { weighed: null, grossMilligrams: null, lessMilligrams: null, loads: [] };
  switch (amount.how) {
    case "all":
      return { ...unread, grams: null, all: true, taking: "taken" };
    case "stated":
      if (!mayState) throw new AppError("stated-in-correction", {}, [...path, "amount"]);
      return { ...unread, grams: amount.grams, all: false, taking: "taken" };
    case "taken": {
      const weighed = readWeighed(tx, amount, occurredAt, [...path, "amount"]);
      return {
        grams: weighed.netGrams,
        all: amount.all,
        taking: "taken",
        weighed,
        grossMilligrams: weighed.grossMilligrams,
        lessMilligrams: weighed.tareMilligrams,
        loads: weighed.loads,
      };
    }
    case "weighed-back":
      return readWeighedBack(tx, amount, occurredAt, [...path, "amount"]);
  }
}

/** The container before less the container after: both are readings, so both have their error. */
function readWeighedBack(
  tx: Tx,
  amount: Extract<StepInput["amount"], { how: "weighed-back" }>,
  occurredAt: Instant,
  path: Path,
): Omit<InputRead, "lot" | "left"> {
  const { scaleId } = amount;
  const before = readOne(tx, scaleId, amount.before, occurredAt, path, "before");
  const after = readOne(tx, scaleId, amount.after, occurredAt, path, "after");
  const grams = before.netGrams - after.netGrams;
  if (grams <= 0) {
    const values = {
      beforeKg: formatMilligrams(before.grossMilligrams),
      afterKg: formatMilligrams(after.grossMilligrams),
    };
    throw new AppError("weighed-back-more", values, [...path, "after", "grossMilligrams"]);
  }
  return {
    grams,
    all: false,
    taking: "weighed-back",
    weighed: before,
    grossMilligrams: before.grossMilligrams - before.tareMilligrams,
    lessMilligrams: after.grossMilligrams - after.tareMilligrams,
    loads: [...before.loads, ...after.loads],
  };
}

export type Shape = Extract<ReturnType<typeof shapeOf>, { kind: "fine" }>;

/** @throws AppError `step-polymers-differ`, `step-forms-differ` */
export function requireShape(kind: StepContent["kind"], inputs: readonly InputRead[]): Shape {
  const shape = shapeOf(
    kind,
    inputs.map(({ lot }) => lot),
  );
  if (shape.kind === "fine") return shape;
  throw new AppError(
    shape.kind === "forms-differ" ? "step-forms-differ" : "step-polymers-differ",
    {},
    ["inputs"],
  );
}

/** @throws AppError `step-output-kind`, `step-output-colour`, `unknown-colour`, and what a weighing throws */
export function readOutputs(
  tx: Tx,
  content: Pick<StepContent, "outputs">,
  inputs: readonly InputRead[],
  shape: Shape,
  occurredAt: Instant,
): OutputRead[] {
  const lots = inputs.map(({ lot }) => lot);
  return content.outputs.map((output, at) => {
    const path = ["outputs", at];
    const { kind, colourCode } = outputKind(output, lots);
    if (kind === null) throw new AppError("step-output-kind", {}, [...path, "kind"]);
    if (colourCode === null) {
      throw new AppError("step-output-colour", {}, [...path, "colourCode"]);
    }
    // A colour that went in may come out, also when it has left the palette.
    if (!lots.some((lot) => lot.colourCode === colourCode)) {
      requireColourInUse(tx, colourCode, [...path, "colourCode"]);
    }
    const { polymer, form, wash } = shape;
    return {
      materialId: ensureMaterial(tx, { polymer, kind, colourCode, form, wash }),
      weighed: readOne(tx, output.scaleId, output.reading, occurredAt, path, "reading"),
    };
  });
}

export type Judged = {
  inputGrams: number;
  outputGrams: number;
  /** By cause, the rest's own cause with it. */
  losses: Map<LossCause, number>;
  lossGrams: number;
  differenceGrams: number;
  toleranceMilligrams: number;
  verdict: Extract<StepVerdict, { kind: "within" | "loss" | "gain" }>;
};

/** @throws AppError `step-beyond-tolerance`, `step-output-above-input` */
export function judgeContent(
  tx: Tx,
  content: StepContent,
  inputs: readonly InputRead[],
  outputs: readonly OutputRead[],
  damp: boolean,
): Judged {
  const inputGrams = inputs.reduce((sum, { lot, grams }) => sum + (grams ?? bookGrams(tx, lot)), 0);
  const outputGrams = outputs.reduce((sum, { weighed }) => sum + weighed.netGrams, 0);
  const losses = new Map<LossCause, number>();
  const lose = (cause: LossCause, grams: number) =>
    losses.set(cause, (losses.get(cause) ?? 0) + grams);
  for (const { cause, grams } of content.losses) lose(cause, grams);
  const named = content.losses.reduce((sum, { grams }) => sum + grams, 0);
  const toleranceMilligrams = toleranceOf([
    ...inputs.flatMap(({ loads }) => loads),
    ...outputs.flatMap(({ weighed }) => weighed.loads),
  ]);
  const verdict = judgeStep(
    { inputGrams, outputGrams, lossGrams: named, toleranceMilligrams, damp },
    content,
  );
  if (verdict.kind === "needs-cause" || verdict.kind === "needs-check") {
    const values = {
      inputKg: formatKg(inputGrams),
      outputKg: formatKg(outputGrams + named),
      differenceKg: formatKg(Math.abs(verdict.differenceGrams)),
      toleranceKg: formatKg(Math.floor(toleranceMilligrams / 1000)),
    };
    throw verdict.kind === "needs-cause"
      ? new AppError("step-beyond-tolerance", values, ["cause"])
      : new AppError("step-output-above-input", values, ["confirmed"]);
  }
  if (verdict.kind === "loss") lose(verdict.cause, verdict.differenceGrams);
  return {
    inputGrams,
    outputGrams,
    losses,
    lossGrams: named + (verdict.kind === "loss" ? verdict.differenceGrams : 0),
    differenceGrams: verdict.kind === "loss" ? 0 : verdict.differenceGrams,
    toleranceMilligrams,
    verdict,
  };
}
