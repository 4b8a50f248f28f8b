/**
 * Invariant: what is only unlikely is asked and never refused, a guess at weigh-in is no material, and nothing
 * here depends on who asks or on the clock of the machine.
 */
import type { Kind, PolymerAnswer } from "@/lib/core/plastics";
import { formatClock, formatDay, dayOf, type Day, type Instant } from "@/lib/core/time";
import type { Refusal } from "@/lib/scales/rules/reading";
import type { Question } from "./terms";

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

/** "6 May 2026, 14:05" in the scheme's zone. */
export function whenWords(at: Instant, zone: string): string {
  return `${formatDay(dayOf(at, zone))}, ${formatClock(at, zone)}`;
}
