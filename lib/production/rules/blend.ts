/**
 * Invariant: the shares of a blend are whole thousandths that add up to 1000, and its grams add up to the need to the
 * gram (largest remainder).
 */
import { allocate } from "@/lib/core/allocate";

export type Share = { colourCode: string; thousandths: number };

export const WHOLE = 1000;

export const sumOfShares = (shares: readonly Share[]): number =>
  shares.reduce((sum, { thousandths }) => sum + thousandths, 0);

/** Grams of each colour, in the order of the shares. @throws RangeError when no share is above zero */
export function gramsOfBlend(grams: number, shares: readonly Share[]): number[] {
  return allocate(
    grams,
    shares.map(({ thousandths }) => thousandths),
  );
}

/**
 * One share moved to a new value; the others give or take in proportion, so that the sum stays whole. Where all others
 * stand at zero, they share what is left alike.
 */
export function moveShare(
  shares: readonly Share[],
  colourCode: string,
  thousandths: number,
): Share[] {
  const value = Math.min(WHOLE, Math.max(0, Math.round(thousandths)));
  const others = shares.filter((share) => share.colourCode !== colourCode);
  if (others.length === 0) return shares.map((share) => ({ ...share, thousandths: WHOLE }));
  const weights = others.map((share) => share.thousandths);
  const given = allocate(
    WHOLE - value,
    weights.some((weight) => weight > 0) ? weights : weights.map(() => 1),
  );
  let at = 0;
  return shares.map((share) =>
    share.colourCode === colourCode
      ? { ...share, thousandths: value }
      : { ...share, thousandths: given[at++] ?? 0 },
  );
}
