/** A step as typed: what goes in, what came out, what was lost; and what it comes to. Plain data. */
import { readDraft, writeDraft } from "@/components/forms/kept-draft";
import { newId } from "@/lib/core/ids";
import { gramsFromMilligrams, readMass } from "@/lib/core/mass";
import type { Kind } from "@/lib/core/plastics";
import type { LossCause } from "@/lib/ledger/terms";
import { loadsOf, toleranceOf, type Load } from "@/lib/scales/rules/loads";
import { netGramsOf, type NamedScale } from "@/lib/scales/rules/reading";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { StepContent } from "@/lib/stock/contract/steps";
import { judgeStep, shapeOf, type StepVerdict } from "@/lib/stock/rules/steps";
import type { StepKind } from "@/lib/stock/terms";
import { sentFound, type FoundValue } from "../stock/left-fields";
import { firstWeighing, sentWeighing, type WeighingValue } from "../stock/weighing-value";
import { emptyReading, type ReadingValue } from "../weighing/form-values";
import { readReading } from "../weighing/read-form";
import type { DeskLists } from "../weighing/use-desk-lists";

export type InputDraft = {
  lot: LotSummary;
  how: "all" | "taken" | "weighed-back" | "stated";
  emptied: boolean;
  weighing: WeighingValue;
  before: ReadingValue;
  after: ReadingValue;
  statedKg: string;
  left: FoundValue;
};
export type OutputDraft = {
  id: string;
  reading: ReadingValue;
  kind: Kind | "";
  colourCode: string;
};
export type LossDraft = { cause: LossCause; kg: string };
export type StepDraft = {
  kind: StepKind | "";
  scaleId: string;
  inputs: InputDraft[];
  outputs: OutputDraft[];
  losses: LossDraft[];
  minutes: string;
  cause: LossCause | "";
  confirmed: boolean;
};

export const EMPTY_STEP: StepDraft = {
  kind: "",
  scaleId: "",
  inputs: [],
  outputs: [],
  losses: [],
  minutes: "",
  cause: "",
  confirmed: false,
};

export function newInput(lot: LotSummary): InputDraft {
  return {
    lot,
    how: lot.heldGrams > 0 ? "all" : "taken",
    emptied: false,
    weighing: firstWeighing(""),
    before: emptyReading(),
    after: emptyReading(),
    statedKg: "",
    left: { found: "", weighing: firstWeighing("") },
  };
}

export function newOutput(last: OutputDraft | undefined): OutputDraft {
  return {
    id: newId(),
    reading: emptyReading(last?.reading),
    kind: last?.kind ?? "",
    colourCode: last?.colourCode ?? "",
  };
}

const gramsOf = (kg: string): number | null => {
  const read = readMass(kg, "kg");
  return read.ok ? gramsFromMilligrams(read.milligrams) : null;
};

const netOf = (value: ReadingValue, lists: DeskLists): number | null => {
  const read = readReading(value, lists.containers);
  return read.ok ? netGramsOf([read.reading]) : null;
};

/** Grams that go in of one lot; null while they cannot be read. */
export function inputGrams(input: InputDraft, lists: DeskLists): number | null {
  switch (input.how) {
    case "all":
      return input.lot.heldGrams;
    case "stated":
      return gramsOf(input.statedKg);
    case "taken": {
      const sent = sentWeighing({ ...input.weighing, scaleId: "any" }, lists.containers);
      return sent && netGramsOf(sent.readings);
    }
    case "weighed-back": {
      const [before, after] = [netOf(input.before, lists), netOf(input.after, lists)];
      return before === null || after === null ? null : before - after;
    }
  }
}

export function outputGrams(output: OutputDraft, lists: DeskLists): number | null {
  return netOf(output.reading, lists);
}

export function lossGrams({ kg }: LossDraft): number | null {
  return gramsOf(kg);
}

function loadsIn(draft: StepDraft, lists: DeskLists, scale: NamedScale): Load[] {
  const values = [
    ...draft.inputs.flatMap((input) =>
      input.how === "taken"
        ? input.weighing.readings
        : input.how === "weighed-back"
          ? [input.before, input.after]
          : [],
    ),
    ...draft.outputs.map(({ reading }) => reading),
  ];
  return values.flatMap((value) => {
    const read = readReading(value, lists.containers);
    return read.ok ? loadsOf(read.reading, scale) : [];
  });
}

export type StepSumsSoFar = {
  inGrams: number;
  outGrams: number;
  lostGrams: number;
  toleranceMilligrams: number;
  verdict: StepVerdict;
};

/** What it comes to so far, judged as the command judges it. */
export function sumsOf(draft: StepDraft, lists: DeskLists): StepSumsSoFar {
  const add = (grams: readonly (number | null)[]) =>
    grams.reduce<number>((sum, one) => sum + (one ?? 0), 0);
  const inGrams = add(draft.inputs.map((input) => inputGrams(input, lists)));
  const outGrams = add(draft.outputs.map((output) => outputGrams(output, lists)));
  const lostGrams = add(draft.losses.map(lossGrams));
  const scale = lists.scales.find(({ id }) => id === draft.scaleId);
  const toleranceMilligrams = scale ? toleranceOf(loadsIn(draft, lists, scale)) : 0;
  const shape =
    draft.kind === ""
      ? null
      : shapeOf(
          draft.kind,
          draft.inputs.map(({ lot }) => lot),
        );
  const verdict = judgeStep(
    {
      inputGrams: inGrams,
      outputGrams: outGrams,
      lossGrams: lostGrams,
      toleranceMilligrams,
      damp: shape?.kind === "fine" && shape.damp,
    },
    { cause: draft.cause || null, confirmed: draft.confirmed },
  );
  return { inGrams, outGrams, lostGrams, toleranceMilligrams, verdict };
}

type SentAmount = StepContent["inputs"][number]["amount"];

function amountOf(input: InputDraft, scaleId: string, lists: DeskLists): SentAmount | null {
  switch (input.how) {
    case "all":
      return { how: "all" };
    case "stated": {
      const grams = gramsOf(input.statedKg);
      return grams === null || grams < 1 ? null : { how: "stated", grams };
    }
    case "taken": {
      const sent = sentWeighing({ ...input.weighing, scaleId }, lists.containers);
      return sent && { how: "taken", all: input.emptied, ...sent };
    }
    case "weighed-back": {
      const before = readReading(input.before, lists.containers);
      const after = readReading(input.after, lists.containers);
      if (!before.ok || !after.ok) return null;
      return {
        how: "weighed-back",
        scaleId,
        before: before.reading,
        after: after.reading,
      } as SentAmount;
    }
  }
}

/** As the endpoint takes it, without time and request id; null while something is missing. */
export function contentOf(
  draft: StepDraft,
  lists: DeskLists,
): Omit<StepContent, "occurredAt"> | null {
  const { kind, scaleId } = draft;
  if (kind === "" || scaleId === "" || draft.inputs.length === 0 || draft.outputs.length === 0) {
    return null;
  }
  const inputs: StepContent["inputs"] = [];
  for (const input of draft.inputs) {
    const amount = amountOf(input, scaleId, lists);
    if (!amount) return null;
    const left = { ...input.left, weighing: { ...input.left.weighing, scaleId } };
    const count = left.found === "" ? null : sentFound(left, lists);
    inputs.push({ number: input.lot.number, amount, count });
  }
  const outputs: StepContent["outputs"] = [];
  for (const output of draft.outputs) {
    const read = readReading(output.reading, lists.containers);
    if (!read.ok) return null;
    const said = { kind: output.kind || null, colourCode: output.colourCode || null };
    outputs.push({ ...said, scaleId, reading: read.reading } as StepContent["outputs"][number]);
  }
  const losses: StepContent["losses"] = [];
  for (const { cause, kg } of draft.losses) {
    const grams = gramsOf(kg);
    if (grams === null) return null;
    if (grams > 0) losses.push({ cause, grams });
  }
  const minutes = /^\d{1,5}$/.test(draft.minutes.trim()) ? Number(draft.minutes) : null;
  return {
    kind,
    minutes: minutes === 0 ? null : minutes,
    inputs,
    outputs,
    losses,
    cause: draft.cause || null,
    confirmed: draft.confirmed,
  };
}

const KEPT_AS = "step";

export function readStepDraft(helperId: string): StepDraft | null {
  const kept = readDraft(KEPT_AS, helperId);
  const looksRight = kept !== null && "inputs" in kept && "outputs" in kept;
  return looksRight ? { ...EMPTY_STEP, ...(kept as Partial<StepDraft>) } : null;
}

/** Keeps the draft on this device; null forgets it. */
export function writeStepDraft(helperId: string, draft: StepDraft | null): void {
  writeDraft(KEPT_AS, helperId, draft);
}
