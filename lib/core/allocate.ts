/**
 * Splits a whole number by weights so that the shares add up to it exactly: the largest-remainder
 * (Hamilton) method. Every split of a mass in the program goes through here.
 */

/**
 * @param total whole number to split; may be negative (the shares then are)
 * @param weights whole numbers of zero or more, at least one above zero unless total is 0
 * @returns one share for each weight, in order; ties of the remainder go to the earlier weight
 * @throws RangeError when total or a weight is not a whole number, or nothing can take the total
 */
export function allocate(total: number, weights: readonly number[]): number[] {
  if (!Number.isSafeInteger(total)) throw new RangeError(`cannot split ${total}`);
  let sum = 0;
  for (const weight of weights) {
    if (!Number.isSafeInteger(weight) || weight < 0) {
      throw new RangeError(`${weight} is not a weight`);
    }
    sum += weight;
  }
  if (total === 0) return weights.map(() => 0);
  if (sum === 0) throw new RangeError("nothing to split by");
  if (total < 0) return allocate(-total, weights).map((share) => (share === 0 ? 0 : -share));
  if (!Number.isSafeInteger(sum)) throw new RangeError("the weights are too large");
  if (total === sum) return [...weights];

  const shares: number[] = [];
  const remainders: { index: number; remainder: number }[] = [];
  let given = 0;
  for (let index = 0; index < weights.length; index += 1) {
    const weight = weights[index] ?? 0;
    const { quotient, remainder } = multiplyDivide(total, weight, sum);
    shares.push(quotient);
    remainders.push({ index, remainder });
    given += quotient;
  }
  let left = total - given;
  if (left > 0) {
    remainders.sort((a, b) => b.remainder - a.remainder || a.index - b.index);
    for (const { index } of remainders) {
      if (left === 0) break;
      shares[index] = (shares[index] ?? 0) + 1;
      left -= 1;
    }
  }
  return shares;
}

/** floor(a × b / c) and its remainder, exact also where a × b is past 2^53. */
function multiplyDivide(a: number, b: number, c: number): { quotient: number; remainder: number } {
  const product = a * b;
  if (product <= Number.MAX_SAFE_INTEGER) {
    return { quotient: Math.floor(product / c), remainder: product % c };
  }
  const exact = BigInt(a) * BigInt(b);
  const divisor = BigInt(c);
  return { quotient: Number(exact / divisor), remainder: Number(exact % divisor) };
}
