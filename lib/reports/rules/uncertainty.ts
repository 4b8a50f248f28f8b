/**
 * Invariant: errors of one scale are added, because they may all lie the same way; different scales are
 * combined by the root of the sum of squares (product.md, Reports; JCGM 100, rectangular distribution).
 */
import type { Basis, Measure } from "@/lib/ledger/terms";

/** What one scale weighed under one heading. */
export type ScaleTotal = {
  measure: Measure;
  basis: Basis;
  /** 0: no scale. */
  scaleNumber: number;
  grams: number;
  /** Sum of the largest errors that its readings may have. */
  mpeMilligrams: number;
};

/**
 * ± 2 u in whole grams, rounded up so that it never promises too much.
 * u of one scale is Σ MPE / √3; 2 u = 2 √(Σ (Σ MPE)² / 3).
 */
export function expandedGrams(totals: readonly ScaleTotal[]): number {
  const byScale = new Map<number, number>();
  for (const total of totals) {
    byScale.set(total.scaleNumber, (byScale.get(total.scaleNumber) ?? 0) + total.mpeMilligrams);
  }
  let squares = 0;
  for (const sum of byScale.values()) squares += (sum * sum) / 3;
  return Math.ceil((2 * Math.sqrt(squares)) / 1000);
}

/** Grams by basis, largest first. */
export function gramsByBasis(totals: readonly ScaleTotal[]): { basis: Basis; grams: number }[] {
  const sums = new Map<Basis, number>();
  for (const total of totals) sums.set(total.basis, (sums.get(total.basis) ?? 0) + total.grams);
  return [...sums]
    .map(([basis, grams]) => ({ basis, grams }))
    .filter((sum) => sum.grams !== 0)
    .sort((a, b) => b.grams - a.grams);
}
