/**
 * Invariant: what a bag held is what its piles and rejects hold, plus a difference that is always named: within
 * what the scale can tell it is a weighing difference, beyond it somebody says where it went or confirms it.
 * Plain data in, plain data out: the form judges as the command does.
 */
import type { Instant } from "@/lib/core/time";
import type { LossCause } from "@/lib/ledger/terms";
import type { Reading } from "@/lib/scales/rules/reading";
import { combinedTolerance, mpeInService, type ScaleSpec } from "@/lib/scales/rules/scale";

/** A load and the scale on which it was read. */
export type Load = { loadMilligrams: number; scale: ScaleSpec };

/**
 * The readings of a scale behind one weighing: its gross, and each tare from the list, which was read once on
 * a scale too (this scale's error stands for it). A typed tare is taken as told.
 */
export function loadsOf(reading: Reading, scale: ScaleSpec): Load[] {
  const { grossMilligrams, containerId, containerTareMilligrams, sackId, sackTareMilligrams } =
    reading;
  const loads = [grossMilligrams];
  if (containerId !== null) loads.push(containerTareMilligrams);
  if (sackId !== null) loads.push(sackTareMilligrams);
  return loads.map((loadMilligrams) => ({ loadMilligrams, scale }));
}

/**
 * How far piles and net may lie apart: 2 u over all readings (the bag's, the piles', the rejects', their
 * tares), not less than the largest display step (product.md, Sorting). Whole milligrams.
 */
export function toleranceOf(loads: readonly Load[]): number {
  return combinedTolerance(
    loads.map((load) => mpeInService(load.scale, load.loadMilligrams)),
    loads.reduce((largest, load) => Math.max(largest, load.scale.dMilligrams), 0),
  );
}

export type SumVerdict =
  /** The scale can explain it: posted as weighing difference (which may be zero). */
  | { kind: "within"; differenceGrams: number }
  /** Less than the bag held, and somebody says where it went: posted as loss. */
  | { kind: "loss"; differenceGrams: number; cause: LossCause }
  /** Less than the bag held; a cause is asked for. */
  | { kind: "needs-cause"; differenceGrams: number }
  /** More than the bag held; weighing again is asked for. */
  | { kind: "needs-check"; differenceGrams: number }
  /** More than the bag held, weighed again: posted as weighing difference. */
  | { kind: "surplus"; differenceGrams: number };

/**
 * Judges piles and rejects against the net.
 *
 * A cause explains what is missing and never a surplus: plastic does not appear. A surplus beyond the
 * tolerance is asked about once, whatever its size, because a slip of the comma looks the same at 6 % and at
 * 900 %; once confirmed it goes through as difference, because work never stops (product.md, The ledger).
 * A cause given within the tolerance is not used: the scale's own doubt comes first.
 *
 * @param sumGrams piles and rejects together
 */
export function judgeSum(
  netGrams: number,
  sumGrams: number,
  toleranceMilligrams: number,
  answer: { cause: LossCause | null; confirmedAbove: boolean },
): SumVerdict {
  const differenceGrams = netGrams - sumGrams;
  if (Math.abs(differenceGrams) * 1000 <= toleranceMilligrams) {
    return { kind: "within", differenceGrams };
  }
  if (differenceGrams > 0) {
    return answer.cause
      ? { kind: "loss", differenceGrams, cause: answer.cause }
      : { kind: "needs-cause", differenceGrams };
  }
  return { kind: answer.confirmedAbove ? "surplus" : "needs-check", differenceGrams };
}

/**
 * When the piles were weighed: between the bag's weigh-in and now, whatever a phone's clock says, because a
 * bag cannot be sorted before it came or after the server heard of it.
 */
export function sortedAt(claimed: Instant, weighedAt: Instant, now: Instant): Instant {
  if (claimed > now) return now;
  return claimed < weighedAt ? weighedAt : claimed;
}
