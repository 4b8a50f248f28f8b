import { netGramsOf } from "@/lib/scales/rules/reading";
import { loadsOf, toleranceOf, type Load } from "@/lib/scales/rules/loads";
import { judgeSum, type SumVerdict } from "@/lib/sorting/rules/table";
import type { ListedTare } from "../weighing/read-form";
import type { DeskScale } from "../weighing/use-desk-lists";
import { readingsOf, type Draft } from "./draft";

/** A bag as far as judging goes: what the piles are made of, and the readings behind it. */
export type TippedBag = { netGrams: number; readings: readonly Load[] };

export type Judged = {
  netGrams: number;
  sumGrams: number;
  toleranceMilligrams: number;
  verdict: SumVerdict;
};

/** What lies on the table against what was tipped, judged as the server judges it. Grams and milligrams, whole. */
export function judgeDraft(
  draft: Pick<Draft, "piles" | "rejects">,
  bags: readonly TippedBag[],
  scale: DeskScale | undefined,
  tares: readonly ListedTare[],
): Judged {
  const readings = readingsOf(draft, tares);
  const netGrams = bags.reduce((sum, bag) => sum + bag.netGrams, 0);
  // Each pile is rounded to grams by itself, as the ledger takes it.
  const sumGrams = readings.reduce((sum, reading) => sum + netGramsOf([reading]), 0);
  const toleranceMilligrams = toleranceOf([
    ...bags.flatMap((bag) => bag.readings),
    ...(scale ? readings.flatMap((reading) => loadsOf(reading, scale)) : []),
  ]);
  const verdict = judgeSum(netGrams, sumGrams, toleranceMilligrams, {
    cause: null,
    confirmedAbove: false,
  });
  return { netGrams, sumGrams, toleranceMilligrams, verdict };
}
