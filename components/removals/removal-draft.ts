/** What stands in the form of a removal, as typed, and what it comes to. Plain data. */
import type * as z from "zod";
import { massSentence } from "@/lib/core/capture-messages";
import { formatMilligrams, gramsFromMilligrams, readMass } from "@/lib/core/mass";
import { fieldSentence } from "@/lib/core/messages";
import type { LotToTake, removalDataSchema, Taking } from "@/lib/removals/contract/removals";
import type { Basis } from "@/lib/ledger/terms";
import type { RemovalView } from "@/lib/removals/queries/removal-page";
import { netGramsOf, type Reading } from "@/lib/scales/rules/reading";
import { emptyReading, NO_TARE, TYPED, type ReadingValue } from "../weighing/form-values";
import { readReading, type ListedTare } from "../weighing/read-form";

export type LoadDraft = {
  /** null: the reject bin. */
  lot: LotToTake | null;
  readings: ReadingValue[];
  statedKg: string;
  /** Nothing is left there. */
  whole: boolean;
};

export type RemovalDraft = {
  how: Taking["how"];
  scaleId: string;
  loads: LoadDraft[];
  destinationId: string;
  day: string;
  noteNumber: string;
};

export function newLoad(lot: LotToTake | null): LoadDraft {
  return { lot, readings: [emptyReading()], statedKg: "", whole: false };
}

/**
 * A saved removal as it can be typed anew. Its readings are not kept one by one: gross and tare of a single place stand
 * as one reading, nets of several places each as a net.
 */
export function draftOf(
  removal: RemovalView,
  lots: readonly { lot: LotToTake; grams: number }[],
  day: string,
): RemovalDraft {
  const { scaleId, grossMilligrams, tareMilligrams, grams } = removal;
  const reading = (grossMg: number, tareMg: number): ReadingValue => ({
    ...emptyReading(),
    gross: formatMilligrams(grossMg),
    container: tareMg > 0 ? { choice: TYPED, text: formatMilligrams(tareMg) } : NO_TARE,
  });
  const load = (lot: LotToTake | null, net: number, alone: boolean): LoadDraft => ({
    lot,
    readings: [
      alone && grossMilligrams !== null
        ? reading(grossMilligrams, tareMilligrams ?? 0)
        : reading(net * 1000, 0),
    ],
    statedKg: kgText(net),
    whole: alone && removal.differenceGrams > 0,
  });
  return {
    how: HOW_OF_BASIS[removal.basis],
    scaleId: scaleId ?? "",
    loads:
      removal.source === "reject-bin"
        ? [load(null, grams, true)]
        : lots.map((one) => load(one.lot, one.grams, lots.length === 1)),
    destinationId: removal.destinationId,
    day,
    noteNumber: removal.noteNumber,
  };
}

const HOW_OF_BASIS: Record<Basis, Taking["how"]> = {
  checked: "weighed",
  unchecked: "weighed",
  // Only a removal by the book is estimated; typed anew its weight is known, and the book has moved on.
  estimated: "stated",
  stated: "stated",
  imported: "stated",
};

/** Sentences by field: "loads.0.readings.1.gross", "destinationId". */
export type DraftProblems = Readonly<Record<string, string>>;

export type RemovalBody = Omit<z.input<typeof removalDataSchema>, "confirmedAbove">;

/** Grams of one load so far: what is typed, or what the book says; null while it cannot be read. */
export function gramsOf(
  draft: Pick<RemovalDraft, "how">,
  load: LoadDraft,
  bookGrams: number,
  tares: readonly ListedTare[],
): number | null {
  switch (draft.how) {
    case "book":
      return bookGrams;
    case "stated": {
      const read = readMass(load.statedKg, "kg");
      return read.ok ? gramsFromMilligrams(read.milligrams) : null;
    }
    case "weighed": {
      const readings = readAll(load, tares);
      return readings === null ? null : netGramsOf(readings);
    }
  }
}

function readAll(load: LoadDraft, tares: readonly ListedTare[]): Reading[] | null {
  const readings: Reading[] = [];
  for (const value of load.readings) {
    const read = readReading(value, tares);
    if (!read.ok) return null;
    readings.push(read.reading);
  }
  return readings;
}

/** Everything that is missing or cannot be read, each with its sentence, in the order of the form. */
export function problemsOf(draft: RemovalDraft, tares: readonly ListedTare[]): DraftProblems {
  const problems: Record<string, string> = {};
  if (draft.how === "weighed" && draft.scaleId === "") problems.scaleId = "Choose the scale.";
  draft.loads.forEach((load, at) => {
    if (draft.how === "stated") {
      const read = readMass(load.statedKg, "kg");
      if (!read.ok) {
        problems[`loads.${at}.grams`] =
          read.problem === "empty"
            ? "Type what the carrier's paper says."
            : massSentence(read.problem, load.statedKg.trim());
      } else if (gramsFromMilligrams(read.milligrams) < 1) {
        problems[`loads.${at}.grams`] = fieldSentence("too_small");
      }
    }
    if (draft.how !== "weighed") return;
    load.readings.forEach((value, index) => {
      const read = readReading(value, tares);
      if (read.ok) return;
      for (const [field, words] of Object.entries(read.problems)) {
        problems[`loads.${at}.readings.${index}.${field}`] = words;
      }
    });
  });
  if (draft.loads.length === 0) problems.loads = "Add at least one lot.";
  if (draft.destinationId === "") problems.destinationId = "Choose where it went.";
  if (draft.day === "") problems.day = fieldSentence("not-a-day");
  return problems;
}

/** The request's data; null while something is missing. */
export function bodyOf(draft: RemovalDraft, tares: readonly ListedTare[]): RemovalBody | null {
  if (Object.keys(problemsOf(draft, tares)).length > 0) return null;
  const { destinationId, day, noteNumber } = draft;
  return { destinationId, day, noteNumber, taking: takingOf(draft, tares) };
}

function takingOf(draft: RemovalDraft, tares: readonly ListedTare[]): RemovalBody["taking"] {
  const { how, scaleId } = draft;
  const lotNumberOf = ({ lot }: LoadDraft): number | null => lot?.number ?? null;
  switch (how) {
    case "book":
      return { how, loads: draft.loads.map((load) => ({ lotNumber: lotNumberOf(load) })) };
    case "stated":
      return {
        how,
        loads: draft.loads.map((load) => ({
          lotNumber: lotNumberOf(load),
          whole: load.whole,
          grams: gramsOf(draft, load, 0, tares) ?? 0,
        })),
      };
    case "weighed":
      return {
        how,
        scaleId,
        loads: draft.loads.map((load) => ({
          lotNumber: lotNumberOf(load),
          whole: load.whole,
          readings: readAll(load, tares) ?? [],
        })),
      };
  }
}

/** Fields of the contract as the form names them: taking.loads.0.readings.0.grossMilligrams is loads.0.readings.0.gross. */
export function formErrors(errors: Readonly<Record<string, string>>): DraftProblems {
  return Object.fromEntries(
    Object.entries(errors).map(([path, words]) => [
      path
        .replace(/^replacement\./, "")
        .replace(/^taking\./, "")
        .replace(/\.grossMilligrams$/, ".gross")
        .replace(/\.(container|sack)(Id|TareMilligrams)$/, ".$1.text"),
      words,
    ]),
  );
}

/** A stored net as it is typed again. */
export function kgText(grams: number): string {
  return formatMilligrams(grams * 1000);
}
