/**
 * Invariant: what went into a step is what came out, plus losses by cause, plus a difference that is always named: within
 * what the scale can tell it is a weighing difference, beyond it somebody says where it went, a damp material
 * explains it, or it was weighed again and confirmed. Polymer never changes in a step.
 */
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import type { LossCause } from "@/lib/ledger/terms";
import type { StepKind } from "../terms";

export type StepMaterial = {
  polymer: PolymerAnswer;
  kind: Kind;
  colourCode: string;
  form: Form;
  wash: WashState;
};

export type ShapeVerdict =
  | { kind: "fine"; polymer: PolymerAnswer; form: Form; wash: WashState; damp: boolean }
  | { kind: "polymers-differ" }
  | { kind: "forms-differ" };

/** Least clean first: what is joined is no cleaner and no drier than its worst part. */
const WASH_ORDER: readonly WashState[] = ["washed", "as-received", "dry"];

/**
 * What comes out of a step by form and wash state. Washing leaves the form and makes damp, drying leaves the form and
 * makes dry, shredding makes flake and leaves the wash state.
 */
export function shapeOf(step: StepKind, inputs: readonly StepMaterial[]): ShapeVerdict {
  const [first] = inputs;
  if (!first || inputs.some(({ polymer }) => polymer !== first.polymer)) {
    return { kind: "polymers-differ" };
  }
  if (step !== "shredding" && inputs.some(({ form }) => form !== first.form)) {
    return { kind: "forms-differ" };
  }
  const worst = WASH_ORDER.find((wash) => inputs.some((input) => input.wash === wash));
  const wash: WashState =
    step === "washing" ? "washed" : step === "drying" ? "dry" : (worst ?? first.wash);
  return {
    kind: "fine",
    polymer: first.polymer,
    form: step === "shredding" ? "flake" : first.form,
    wash,
    damp: wash === "washed" || inputs.some((input) => input.wash === "washed"),
  };
}

/** Kind and colour of an output: as said, or those of the inputs where only one went in; null: it must be said. */
export function outputKind(
  said: { kind: Kind | null; colourCode: string | null },
  inputs: readonly StepMaterial[],
): { kind: Kind | null; colourCode: string | null } {
  const only = <T>(values: readonly T[]): T | null =>
    new Set(values).size === 1 ? (values[0] ?? null) : null;
  return {
    kind: said.kind ?? only(inputs.map(({ kind }) => kind)),
    colourCode: said.colourCode ?? only(inputs.map(({ colourCode }) => colourCode)),
  };
}

/** More water than half of what went in is asked about: it looks like a slip of the comma. */
const MOST_WATER_SHARE = 0.5;

export type StepSums = {
  inputGrams: number;
  outputGrams: number;
  /** Losses that were named. */
  lossGrams: number;
  toleranceMilligrams: number;
  /** Something damp went in or came out. */
  damp: boolean;
};

export type StepVerdict =
  /** differenceGrams = input − output − losses; below zero a gain. */
  | { kind: "within"; differenceGrams: number }
  /** It goes to loss of this cause. */
  | { kind: "loss"; differenceGrams: number; cause: LossCause }
  /** A gain that water explains, or that was weighed again and confirmed. */
  | { kind: "gain"; differenceGrams: number }
  | { kind: "needs-cause"; differenceGrams: number }
  | { kind: "needs-check"; differenceGrams: number };

/**
 * Judges a step. A cause explains what is missing and never a gain; a cause given within the tolerance is not used,
 * because the scale's own doubt comes first.
 */
export function judgeStep(
  sums: StepSums,
  answer: { cause: LossCause | null; confirmed: boolean },
): StepVerdict {
  const { inputGrams, outputGrams, lossGrams, toleranceMilligrams, damp } = sums;
  const differenceGrams = inputGrams - outputGrams - lossGrams;
  if (Math.abs(differenceGrams) * 1000 <= toleranceMilligrams) {
    return { kind: "within", differenceGrams };
  }
  if (differenceGrams > 0) {
    return answer.cause
      ? { kind: "loss", differenceGrams, cause: answer.cause }
      : { kind: "needs-cause", differenceGrams };
  }
  const water = damp && -differenceGrams <= inputGrams * MOST_WATER_SHARE;
  return { kind: water || answer.confirmed ? "gain" : "needs-check", differenceGrams };
}

/** Causes that a step can lose by, the likeliest first. */
export const STEP_CAUSES: Record<StepKind, readonly LossCause[]> = {
  washing: ["dirt", "liquid", "metal", "spilled"],
  drying: ["moisture", "spilled"],
  shredding: ["dust", "metal", "cuttings", "spilled"],
};
