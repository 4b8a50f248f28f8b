/** Largest remainder in whole numbers without end (BigInt), straight from its definition. */

export type Weight = { key: number; grams: number };

/**
 * Splits grams in proportion to weights: each share rounded down, then one gram more for the largest
 * remainders; of equal remainders the lower key comes first. Weights at or below zero get nothing.
 *
 * @returns share by key; empty when there is no weight above zero
 */
export function shares(grams: number, weights: readonly Weight[]): Map<number, number> {
  const real = weights.filter((weight) => weight.grams > 0).sort((a, b) => a.key - b.key);
  const whole = real.reduce((sum, weight) => sum + BigInt(weight.grams), 0n);
  if (whole === 0n) return new Map();
  const exact = real.map((weight) => {
    const product = BigInt(grams) * BigInt(weight.grams);
    return { key: weight.key, floor: product / whole, remainder: product % whole };
  });
  let left = Number(BigInt(grams) - exact.reduce((sum, share) => sum + share.floor, 0n));
  const given = new Map(exact.map((share) => [share.key, Number(share.floor)]));
  const byRemainder = [...exact].sort((a, b) =>
    a.remainder === b.remainder ? a.key - b.key : a.remainder > b.remainder ? -1 : 1,
  );
  for (const share of byRemainder) {
    if (left === 0) break;
    given.set(share.key, (given.get(share.key) ?? 0) + 1);
    left -= 1;
  }
  return given;
}
