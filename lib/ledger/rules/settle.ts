/**
 * The settling entry of a correcting act (ledger.md, "Correcting").
 *
 * Invariant: after it no holder is short. What a holder lacks in all is posted as difference, in the
 * missing origin; where only an origin or a heating is short, the holder's other parts give it in
 * proportion, which reports show as re-sorted.
 */
import { allocate } from "@/lib/core/allocate";
import type { Account, Dimension } from "../terms";
import { DIMENSIONS } from "../terms";
import {
  addTo,
  isSound,
  negated,
  partsOf,
  type Composition,
  type Holding,
  type Parts,
} from "./holding";
import type { Line } from "./split";

export type Short = { account: Account; holderId: number; materialId: number; holding: Holding };

function split(total: number, weights: Parts): Parts {
  const shares = allocate(
    total,
    weights.map(([, weight]) => Math.abs(weight)),
  );
  return weights
    .map(([key], index) => [key, shares[index] ?? 0] as const)
    .filter(([, grams]) => grams !== 0);
}

const below = (map: ReadonlyMap<number, number>): Parts => partsOf(map).filter(([, g]) => g < 0);
const above = (map: ReadonlyMap<number, number>): Parts => partsOf(map).filter(([, g]) => g > 0);
const size = (parts: Parts): number => parts.reduce((sum, [, grams]) => sum + Math.abs(grams), 0);

function line(short: Short, grams: number, parts: Composition, account?: "difference"): Line {
  return {
    account: account ?? short.account,
    cause: null,
    holderId: account ? null : short.holderId,
    materialId: short.materialId,
    grams,
    after: account ? null : short.holding.grams,
    basis: null,
    scaleNumber: null,
    mpeMilligrams: null,
    parts,
  };
}

const both = (make: (dim: Dimension) => Parts): Composition => ({ O: make("O"), H: make("H") });

/** What the holder lacks in all, from `difference`. */
function shortInAll(short: Short): Line[] {
  const lack = Math.max(0, -short.holding.grams);
  if (lack === 0) return [];
  const parts = both((dim) => split(lack, below(short.holding[dim])));
  addTo(short.holding, lack, parts);
  return [
    line(
      short,
      -lack,
      both((dim) => negated(parts[dim])),
      "difference",
    ),
    line(short, lack, parts),
  ];
}

/** Parts that are short although the holder is not: two lines on the same holder that cancel. */
function shortInParts(short: Short): Line[] {
  const holding = short.holding;
  const moved = Math.max(...DIMENSIONS.map((dim) => size(below(holding[dim]))));
  if (moved === 0) return [];
  const gets: Record<Dimension, Parts> = { O: [], H: [] };
  const gives: Record<Dimension, Parts> = { O: [], H: [] };
  for (const dim of DIMENSIONS) {
    const missing = below(holding[dim]);
    const lack = size(missing);
    const get = new Map(missing.map(([key, grams]) => [key, -grams] as const));
    const give = new Map(lack > 0 ? split(lack, above(holding[dim])) : []);
    // The other dimension moves more: this one moves the same key there and back.
    const filler = above(holding[dim])[0]?.[0] ?? missing[0]?.[0] ?? 0;
    if (moved > lack) {
      get.set(filler, (get.get(filler) ?? 0) + moved - lack);
      give.set(filler, (give.get(filler) ?? 0) + moved - lack);
    }
    gets[dim] = partsOf(get);
    gives[dim] = negated(partsOf(give));
  }
  addTo(holding, moved, gets);
  const into = line(short, moved, gets);
  addTo(holding, -moved, gives);
  return [into, line(short, -moved, gives)];
}

/**
 * @param holdings every holding that the act touched, as it stands after the act's other entries; changed
 * @returns the lines of the settling entry, none when nothing is short
 */
export function settlingLines(holdings: readonly Short[]): Line[] {
  return [...holdings]
    .filter((short) => !isSound(short.holding))
    .sort((a, b) => a.holderId - b.holderId || a.materialId - b.materialId)
    .flatMap((short) => [...shortInAll(short), ...shortInParts(short)]);
}
