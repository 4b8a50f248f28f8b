/**
 * Invariant: what a bag held is what its piles and rejects hold, plus a difference that is always named: within
 * what the scale can tell it is a weighing difference, beyond it somebody says where it went or confirms it.
 * Plain data in, plain data out: the form judges as the command does.
 */
import type { Instant } from "@/lib/core/time";
import type { LossCause } from "@/lib/ledger/terms";

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
