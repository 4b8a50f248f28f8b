/** What the typed form comes to: readings in milligrams, net in grams, or a sentence for each field. */
import { readScan } from "@/lib/core/bag-code";
import { readMass } from "@/lib/core/mass";
import { captureSentence, massSentence } from "@/lib/core/capture-messages";
import {
  netGramsOf,
  refuseReading,
  refuseReadings,
  type NamedScale,
  type Reading,
} from "@/lib/scales/rules/reading";
import { missingOfMaterial } from "@/lib/weighing/rules";
import type { Question } from "@/lib/weighing/terms";
import { TYPED, type FormValues, type ReadingValue, type TareValue } from "./form-values";
import type { WeighInEndpointInput } from "./weigh-in-body";

export type ListedTare = {
  id: string;
  kind: "container" | "sack";
  name: string;
  tareMilligrams: number;
};

type TareReading =
  { ok: true; id: string | null; milligrams: number } | { ok: false; sentence: string };

/** A tare as chosen or typed. A typed tare that is left empty is none. */
export function readTare(tare: TareValue, listed: readonly ListedTare[]): TareReading {
  if (tare.choice === "") return { ok: true, id: null, milligrams: 0 };
  if (tare.choice === TYPED) {
    const typed = readMass(tare.text, "kg");
    if (typed.ok) return { ok: true, id: null, milligrams: typed.milligrams };
    return typed.problem === "empty"
      ? { ok: true, id: null, milligrams: 0 }
      : { ok: false, sentence: massSentence(typed.problem, tare.text.trim()) };
  }
  const found = listed.find(({ id }) => id === tare.choice);
  return found
    ? { ok: true, id: found.id, milligrams: found.tareMilligrams }
    : { ok: false, sentence: captureSentence("unknown-container") };
}

/** Sentences by field, as react-hook-form names fields: "readings.0.gross". */
export type Problems = Record<string, string>;

export type ReadForm =
  | { ok: true; code: string; readings: Reading[]; netGrams: number }
  | { ok: false; problems: Problems };

/** One reading of the form, or its sentences by field within the reading. */
export function readReading(
  value: ReadingValue,
  listed: readonly ListedTare[],
): { ok: true; reading: Reading } | { ok: false; problems: Problems } {
  const gross = readMass(value.gross, "kg");
  const container = readTare(value.container, listed);
  const sack = readTare(value.sack, listed);
  const problems: Problems = {};
  if (!gross.ok) problems.gross = massSentence(gross.problem, value.gross.trim());
  if (!container.ok) problems["container.text"] = container.sentence;
  if (!sack.ok) problems["sack.text"] = sack.sentence;
  if (!gross.ok || !container.ok || !sack.ok) return { ok: false, problems };
  return {
    ok: true,
    reading: {
      grossMilligrams: gross.milligrams,
      containerId: container.id,
      containerTareMilligrams: container.milligrams,
      sackId: sack.id,
      sackTareMilligrams: sack.milligrams,
    },
  };
}

/** Net of what can be read so far, in grams; null while nothing can. It may be below zero. */
export function netSoFar(
  values: readonly ReadingValue[],
  listed: readonly ListedTare[],
): number | null {
  const readings = values.flatMap((value) => {
    const read = readReading(value, listed);
    return read.ok ? [read.reading] : [];
  });
  return readings.length === 0 ? null : netGramsOf(readings);
}

/** Why the scale cannot have shown a reading, as soon as it is typed; null while it is incomplete or fine. */
export function readingRefusal(
  value: ReadingValue,
  listed: readonly ListedTare[],
  scale: NamedScale | undefined,
): string | null {
  const read = readReading(value, listed);
  if (!read.ok || !scale) return null;
  const refusal = refuseReading(scale, read.reading, 0);
  return refusal && captureSentence(refusal.code, refusal.detail);
}

export const CODE_SENTENCES = {
  empty: "Scan the tag, or type its code.",
  wrong: "That is no code of a tag here. One letter or figure is wrong; compare it with the label.",
  short: "A code has eight letters and figures, such as K7Q2-9F4M.",
} as const;

/** Everything that keeps the form from being saved, each with its own sentence. */
export function readForm(
  values: FormValues,
  scale: NamedScale | undefined,
  listed: readonly ListedTare[],
): ReadForm {
  const problems: Problems = {};
  const code = readScan(values.code);
  if (code === null) {
    problems.code = values.code.trim() === "" ? CODE_SENTENCES.empty : CODE_SENTENCES.wrong;
  }
  if (!scale) problems.scaleId = "Choose the scale.";
  const readings: Reading[] = [];
  values.readings.forEach((value, index) => {
    const read = readReading(value, listed);
    if (read.ok) readings.push(read.reading);
    else {
      for (const [field, words] of Object.entries(read.problems)) {
        problems[`readings.${index}.${field}`] = words;
      }
    }
  });
  if (scale && readings.length === values.readings.length) {
    const refusal = refuseReadings(scale, readings);
    if (refusal) problems[formField(refusal.path)] = captureSentence(refusal.code, refusal.detail);
  }
  const missing = values.oneKind
    ? missingOfMaterial({
        polymer: values.polymer,
        kind: values.kind || null,
        colourCode: values.colourCode || null,
      })
    : null;
  if (missing) problems[missing] = ONE_KIND_SENTENCES[missing];
  if (code === null || Object.keys(problems).length > 0) return { ok: false, problems };
  return { ok: true, code, readings, netGrams: netGramsOf(readings) };
}

const ONE_KIND_SENTENCES = {
  polymer: "Choose the resin code of the bag. A mixed bag is not one kind.",
  kind: "Choose what it is, such as lids.",
  colourCode: "Choose the colour of the bag; “Mixed” is one.",
} as const;

/** A field of the contract as the form names it: readings.0.grossMilligrams is readings.0.gross. */
export function formField(path: readonly (string | number)[]): string {
  return path
    .join(".")
    .replace(/\.grossMilligrams$/, ".gross")
    .replace(/\.(container|sack)(Id|TareMilligrams)$/, ".$1.text");
}

export type Sending = {
  requestId: string;
  occurredAt: number;
  helperId: string;
  confirmed: Question[];
};

/** The request's body. A kind belongs to a bag of one kind only. */
export function inputOf(
  values: FormValues,
  read: Extract<ReadForm, { ok: true }>,
  sending: Sending,
): WeighInEndpointInput {
  return {
    requestId: sending.requestId,
    code: read.code,
    scaleId: values.scaleId,
    occurredAt: sending.occurredAt,
    readings: read.readings,
    polymer: values.polymer,
    kind: values.oneKind ? values.kind || null : null,
    colourCode: values.colourCode || null,
    oneKind: values.oneKind,
    condition: values.condition,
    pointId: values.pointId || null,
    helperId: sending.helperId,
    confirmed: sending.confirmed,
  };
}
