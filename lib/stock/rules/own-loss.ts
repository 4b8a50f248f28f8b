/**
 * Invariant: the scheme's own loss of a step rests on its own last steps and on nothing else: the share of what went in
 * that did not come out, whatever it was called. Where water came in it is below zero, so that a chain of washing and
 * drying multiplies to what is really left.
 */

export type StepShare = { inputGrams: number; outputGrams: number };

/** Steps that the mean rests on. */
export const LAST_STEPS = 20;

/**
 * Mean and sample standard deviation (divisor n − 1) of (input − output) / input.
 *
 * @param steps each with an input above zero
 * @returns shares of 1; null where there are too few
 */
export function lossOf(steps: readonly StepShare[]): {
  count: number;
  mean: number | null;
  spread: number | null;
} {
  const shares = steps.map(
    ({ inputGrams, outputGrams }) => (inputGrams - outputGrams) / inputGrams,
  );
  const count = shares.length;
  if (count === 0) return { count, mean: null, spread: null };
  const mean = shares.reduce((sum, share) => sum + share, 0) / count;
  if (count === 1) return { count, mean, spread: null };
  const squares = shares.reduce((sum, share) => sum + (share - mean) ** 2, 0);
  return { count, mean, spread: Math.sqrt(squares / (count - 1)) };
}

/** "1.4 %", "gains 8.0 %"; one decimal, which is more than a few steps can tell. */
export function shareWords(share: number): string {
  const percent = Math.abs(share * 100).toFixed(1);
  return share < -0.0005 ? `gains ${percent}\u00a0%` : `${percent}\u00a0%`;
}
