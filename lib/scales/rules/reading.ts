/**
 * Invariant: net is gross less both tares, summed over the readings in whole milligrams and rounded to grams
 * once, on the sum; what a scale cannot have shown is refused with its reason.
 */
import type { ErrorCode, ErrorDetail } from "@/lib/core/errors";
import { formatMilligrams, gramsFromMilligrams } from "@/lib/core/mass";
import { checkReading, mpeInService, type ScaleSpec } from "./scale";

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
 * The error that each reading of a weighing may have, in whole milligrams: each gross is a reading, and so is each
 * listed tare, which was read once on a scale too (this scale's error stands for it).
 */
export function errorsOf(scale: ScaleSpec, readings: readonly Reading[]): number[] {
  return readings.flatMap((reading) => {
    const loads = [reading.grossMilligrams];
    if (reading.containerId !== null) loads.push(reading.containerTareMilligrams);
    if (reading.sackId !== null) loads.push(reading.sackTareMilligrams);
    return loads.map((load) => mpeInService(scale, load));
  });
}

/** The same errors added up: errors of one scale are fully correlated. */
export function mpeOf(scale: ScaleSpec, readings: readonly Reading[]): number {
  return errorsOf(scale, readings).reduce((sum, error) => sum + error, 0);
}
