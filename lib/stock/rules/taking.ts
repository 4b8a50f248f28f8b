/**
 * Invariant: taking out never stops work. Within what the scale can tell, the book gives what it holds and the rest
 * is weighing difference in the same entry; beyond it one count on the spot says what is there (product.md, The
 * ledger). Nothing is ever taken that the book does not hold.
 */

export type Taking = {
  /** What the book holds, in grams. */
  bookGrams: number;
  /** What was taken out, in grams. */
  wantedGrams: number;
  /** What the readings behind `wantedGrams` can tell, in milligrams. */
  toleranceMilligrams: number;
  /** The container is empty now: the weighing is a count of it as well. */
  all: boolean;
};

export type TakingVerdict =
  /** `takenGrams` leave the book; `differenceGrams` = taken less wanted goes to difference (below zero: a gain). */
  | { kind: "fine"; takenGrams: number; differenceGrams: number }
  /** Everything was weighed, and book and scale disagree: what was weighed is the count. */
  | { kind: "is-a-count" }
  /** More than the book holds, and something may be left: one count on the spot is asked for. */
  | { kind: "holds-less" };

/** Judges what is taken from one lot. */
export function judgeTaking({
  bookGrams,
  wantedGrams,
  toleranceMilligrams,
  all,
}: Taking): TakingVerdict {
  const over = wantedGrams - bookGrams;
  const explained = Math.abs(over) * 1000 <= toleranceMilligrams;
  if (!all && over <= 0) return { kind: "fine", takenGrams: wantedGrams, differenceGrams: 0 };
  // An empty book has no origin to take from: a count puts something there first.
  if (bookGrams > 0 && explained) {
    return { kind: "fine", takenGrams: bookGrams, differenceGrams: bookGrams - wantedGrams };
  }
  return { kind: all ? "is-a-count" : "holds-less" };
}
