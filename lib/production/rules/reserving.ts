/**
 * Invariant: no plan to reserve takes more of a lot than is free, nor more of a colour than the run still lacks.
 */

export type FreeLot = {
  lotId: string;
  number: number;
  colourCode: string;
  freeGrams: number;
};

export type Pick = { lotId: string; number: number; colourCode: string; grams: number };

/**
 * Oldest lots first: each colour is filled from its lots in the order in which they were opened.
 *
 * @param lacking grams that each colour still lacks
 * @param lots free lots, oldest first
 * @returns what to take of which lot, and what no lot covers
 */
export function oldestFirst(
  lacking: readonly { colourCode: string; grams: number }[],
  lots: readonly FreeLot[],
): { picks: Pick[]; uncovered: { colourCode: string; grams: number }[] } {
  const picks: Pick[] = [];
  const uncovered: { colourCode: string; grams: number }[] = [];
  for (const { colourCode, grams } of lacking) {
    let left = grams;
    for (const lot of lots) {
      if (left === 0) break;
      if (lot.colourCode !== colourCode || lot.freeGrams <= 0) continue;
      const take = Math.min(left, lot.freeGrams);
      picks.push({ lotId: lot.lotId, number: lot.number, colourCode, grams: take });
      left -= take;
    }
    if (left > 0) uncovered.push({ colourCode, grams: left });
  }
  return { picks, uncovered };
}
