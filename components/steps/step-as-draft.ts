/** A saved step taken back into the form, so that it can be corrected. Plain data. */
import { formatKg, formatMilligrams } from "@/lib/core/mass";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { StepView } from "@/lib/stock/contract/steps";
import { NO_TARE, TYPED } from "../weighing/form-values";
import { EMPTY_STEP, newInput, newOutput, type StepDraft } from "./step-draft";

const plainKg = (grams: number): string => formatKg(grams).replaceAll("\u2009", "");

function lotOf(row: StepView["inputs"][number]): LotSummary {
  const { number, polymer, kind, colourCode, colourName, colourHex, colourLook, form, wash } = row;
  return {
    number,
    polymer,
    kind,
    colourCode,
    colourName,
    colourHex,
    colourLook,
    form,
    wash,
    place: "",
    openedAt: 0,
    closedAt: null,
    closedFor: null,
    containerName: null,
    heldGrams: row.grams,
  };
}

/** What went in by its weight, what came out by its readings with their tares as typed ones. */
export function draftOf(step: StepView): StepDraft {
  return {
    ...EMPTY_STEP,
    kind: step.kind,
    scaleId: step.outputs[0]?.scaleId ?? "",
    inputs: step.inputs.map((row) => ({
      ...newInput(lotOf(row)),
      how: "stated",
      statedKg: plainKg(row.grams),
    })),
    outputs: step.outputs.map((row) => ({
      ...newOutput(undefined),
      kind: row.kind,
      colourCode: row.colourCode,
      reading: {
        gross: formatMilligrams(row.grossMilligrams ?? row.grams * 1000),
        container:
          row.tareMilligrams === 0
            ? NO_TARE
            : { choice: TYPED, text: formatMilligrams(row.tareMilligrams) },
        sack: NO_TARE,
      },
    })),
    losses: step.losses.map(({ cause, grams }) => ({ cause, kg: plainKg(grams) })),
    minutes: step.minutes === null ? "" : String(step.minutes),
  };
}
