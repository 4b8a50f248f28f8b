/**
 * Invariant: net is gross less both tares, summed over the readings in whole milligrams and rounded to grams
 * once, on the sum; what a scale cannot have shown is refused with its reason, what is only unlikely is
 * asked, and nothing here depends on who asks or on the clock of the machine.
 */
import type { ErrorCode, ErrorDetail } from "@/lib/core/errors";
import { formatMilligrams, gramsFromMilligrams } from "@/lib/core/mass";
import type { Kind, PolymerAnswer } from "@/lib/core/plastics";
import { formatClock, formatDay, dayOf, type Day, type Instant } from "@/lib/core/time";
import { checkReading, mpeInService, type ScaleSpec } from "@/lib/scales/rules";
import { UNDO_MS, type Question } from "./terms";

/** One reading of the scale; masses in whole milligrams. */
export type Reading = {
  grossMilligrams: number;
  /** A listed tare was a reading of a scale itself; one that was typed in is taken as told. */
  containerId: string | null;
  containerTareMilligrams: number;
  sackId: string | null;
  sackTareMilligrams: number;
};

export type NamedScale = ScaleSpec & { name: string };

/** A refusal as a command throws it: code, values for its sentence, and the field. */
export type Refusal<Code extends ErrorCode = ErrorCode> = {
  code: Code;
  detail: ErrorDetail;
  path: readonly (string | number)[];
};

/** Why readings cannot be taken. */
type ReadingCode = "above-max" | "not-a-step" | "tare-above-gross" | "net-zero";

export function tareMilligrams(reading: Reading): number {
  return reading.containerTareMilligrams + reading.sackTareMilligrams;
}

/** Gross less tare of one reading; below zero while a tare is above its gross. */
export function netMilligrams(reading: Reading): number {
  return reading.grossMilligrams - tareMilligrams(reading);
}

/** Net of a bag in whole grams: the sum of its readings, rounded once. */
export function netGramsOf(readings: readonly Reading[]): number {
  return gramsFromMilligrams(readings.reduce((sum, reading) => sum + netMilligrams(reading), 0));
}

/**
 * Can this scale have shown this reading, and does the tare fit below it?
 *
 * @param index place of the reading in its ticket, for the field's path
 * @returns why not, or null
 */
export function refuseReading(
  scale: NamedScale,
  reading: Reading,
  index: number,
): Refusal<ReadingCode> | null {
  const path = ["readings", index, "grossMilligrams"];
  const readingKg = formatMilligrams(reading.grossMilligrams);
  switch (checkReading(scale, reading.grossMilligrams)) {
    case "above-max":
      return {
        code: "above-max",
        detail: { scale: scale.name, maxKg: formatMilligrams(scale.maxMilligrams), readingKg },
        path,
      };
    case "not-a-step":
      return {
        code: "not-a-step",
        detail: { step: stepWords(scale.dMilligrams), readingKg },
        path,
      };
    case "below-minimum":
    case "fine":
  }
  const tare = tareMilligrams(reading);
  return tare > reading.grossMilligrams
    ? {
        code: "tare-above-gross",
        detail: { tareKg: formatMilligrams(tare), grossKg: readingKg },
        path,
      }
    : null;
}

/** "5 g", "0.5 g", "20 g": a display step as a person says it. */
export function stepWords(milligrams: number): string {
  const grams = Math.floor(milligrams / 1000);
  const rest = String(milligrams % 1000)
    .padStart(3, "0")
    .replace(/0+$/, "");
  return `${grams}${rest === "" ? "" : `.${rest}`} g`;
}

/** The first reason why a bag's readings cannot be taken, or null. */
export function refuseReadings(
  scale: NamedScale,
  readings: readonly Reading[],
): Refusal<ReadingCode> | null {
  for (const [index, reading] of readings.entries()) {
    const refusal = refuseReading(scale, reading, index);
    if (refusal) return refusal;
  }
  return netGramsOf(readings) > 0
    ? null
    : { code: "net-zero", detail: {}, path: ["readings", readings.length - 1, "grossMilligrams"] };
}

/** Is a reading under the scale's minimum capacity? It is accepted and marked. */
export function isBelowMinimum(scale: ScaleSpec, readings: readonly Reading[]): boolean {
  return readings.some(
    (reading) => checkReading(scale, reading.grossMilligrams) === "below-minimum",
  );
}

/**
 * The errors that a bag's readings may have, in whole milligrams, added up: errors of one scale are fully
 * correlated. Each gross is a reading, and so is each listed tare.
 */
export function mpeOf(scale: ScaleSpec, readings: readonly Reading[]): number {
  let sum = 0;
  for (const reading of readings) {
    sum += mpeInService(scale, reading.grossMilligrams);
    if (reading.containerId !== null) sum += mpeInService(scale, reading.containerTareMilligrams);
    if (reading.sackId !== null) sum += mpeInService(scale, reading.sackTareMilligrams);
  }
  return sum;
}

/** A clock that is ahead by less than this is taken as right. */
const CLOCK_SLACK_MS = 2 * 60 * 1000;

export function isInFuture(occurredAt: Instant, now: Instant): boolean {
  return occurredAt - now > CLOCK_SLACK_MS;
}

/** Refuses a time before the scheme's first day. */
export function refuseTime(
  occurredAt: Instant,
  scheme: { firstDay: Day; timeZone: string },
): Refusal | null {
  const onDay = dayOf(occurredAt, scheme.timeZone);
  return onDay < scheme.firstDay
    ? { code: "too-long-ago", detail: { when: formatDay(onDay) }, path: ["occurredAt"] }
    : null;
}

/** How many times the usual bag is still plausible. */
const PLAUSIBLE_TIMES = 3;
/** With fewer bags of a point there is no usual one. */
const LEAST_BAGS = 3;

/**
 * The middle one of the point's last bags in grams (of an even number the lower middle), or null while there
 * are too few to tell.
 */
export function usualBag(lastNetGrams: readonly number[]): number | null {
  if (lastNetGrams.length < LEAST_BAGS) return null;
  const sorted = [...lastNetGrams].sort((a, b) => a - b);
  return sorted[Math.floor((sorted.length - 1) / 2)] ?? null;
}

export function isFarAboveUsual(netGrams: number, usualGrams: number | null): boolean {
  return usualGrams !== null && netGrams > PLAUSIBLE_TIMES * usualGrams;
}

/** Questions that were raised and not yet answered. */
export function openQuestions(
  raised: readonly Question[],
  confirmed: readonly Question[],
): Question[] {
  return raised.filter((question) => !confirmed.includes(question));
}

export type MaterialAnswer = {
  polymer: PolymerAnswer;
  kind: Kind | null;
  colourCode: string | null;
};

/**
 * The material of a bag of one kind, or null while something is missing. "Mixed" is no kind of plastic; "Not
 * sure" has a stock of its own until somebody identifies it.
 */
export function materialOf(
  answer: MaterialAnswer,
): { polymer: PolymerAnswer; kind: Kind; colourCode: string } | null {
  const { polymer, kind, colourCode } = answer;
  if (polymer === "mixed" || kind === null || colourCode === null) return null;
  return { polymer, kind, colourCode };
}

/** The field of a bag of one kind that still says nothing, or null when its material is complete. */
export function missingOfMaterial(
  answer: MaterialAnswer,
): "polymer" | "kind" | "colourCode" | null {
  if (answer.polymer === "mixed") return "polymer";
  if (answer.kind === null) return "kind";
  return answer.colourCode === null ? "colourCode" : null;
}

/** Is undo still open? It runs from when the record was written, not from when the bag was weighed. */
export function mayStillUndo(recordedAt: Instant, now: Instant): boolean {
  return now - recordedAt <= UNDO_MS;
}

/** "6 May 2026, 14:05" in the scheme's zone. */
export function whenWords(at: Instant, zone: string): string {
  return `${formatDay(dayOf(at, zone))}, ${formatClock(at, zone)}`;
}

/**
 * First instant of the day on which `now` falls. Found by halving, because days of a zone may have 23 or 25
 * hours.
 */
export function startOfDay(now: Instant, zone: string): Instant {
  const today = dayOf(now, zone);
  let before = now - 26 * 3_600_000;
  let inside: number = now;
  while (inside - before > 1) {
    const middle = Math.floor((before + inside) / 2);
    if (dayOf(middle as Instant, zone) === today) inside = middle;
    else before = middle;
  }
  return inside as Instant;
}
