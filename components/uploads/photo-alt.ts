/**
 * What a picture shows, in words made from what is known: "Blue HDPE, 2.160 kg, 6 May 2026, photo 2 of 3".
 * Nobody has to type it, and it never guesses at what is seen.
 */
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES, type PolymerAnswer } from "@/lib/core/plastics";
import { dayOf, formatDay, instant, type Day } from "@/lib/core/time";
import { pileName } from "@/lib/stock/rules/material-words";
import type { PhotoPurpose } from "@/lib/uploads/terms";

export type PhotoFacts = {
  /** "Blue HDPE" */
  what: string;
  /** What it weighs; null when it was not weighed yet. */
  grams: number | null;
  /** Day of what is shown; null where the picture's own day says more. */
  day: Day | null;
  timeZone: string;
};

/**
 * @param photo `addedAt` in epoch milliseconds
 * @param at its place among the subject's photos, from 1
 */
export function photoAlt(
  { what, grams, day, timeZone }: PhotoFacts,
  photo: { purpose: PhotoPurpose; addedAt: number },
  at: number,
  of: number,
): string {
  return [
    photo.purpose === "chip" ? `Chip of ${what}` : what,
    ...(grams === null ? [] : [`${formatKg(grams)} kg`]),
    formatDay(day ?? dayOf(instant(photo.addedAt), timeZone)),
    ...(of > 1 ? [`photo ${at} of ${of}`] : []),
  ].join(", ");
}

/** What is probably in a bag that was weighed and not sorted: its answers are a guess and stay one. */
export function likelyWhat(polymer: PolymerAnswer, colourName: string | null): string {
  if (POLYMER_NAMES[polymer].resinCode === null) {
    return colourName === null ? "Plastic to sort" : `${colourName} plastic to sort`;
  }
  if (colourName !== null) return pileName(colourName, polymer);
  return polymer === "O" ? "Other plastic" : POLYMER_NAMES[polymer].name;
}
