/**
 * The pool of an entry: everything its sources gave, by material, from which outputs take one after another.
 *
 * Invariant: what an output takes is split by material first and inside a material by key, by largest
 * remainder over what is left; no part goes below zero and the last output takes the rest.
 */
import { allocate } from "@/lib/core/allocate";
import { UNKNOWN_ORIGIN, type Dimension } from "../terms";
import {
  addParts,
  addTo,
  negated,
  partsOf,
  type Composition,
  type Holding,
  type Parts,
} from "./holding";

export type Pool = Map<number, Holding>;

export function poolOf(pool: Pool, materialId: number): Holding {
  let found = pool.get(materialId);
  if (!found) {
    found = { grams: 0, O: new Map(), H: new Map() };
    pool.set(materialId, found);
  }
  return found;
}

/** Splits grams over parts in proportion; parts below zero (inside an act) give nothing. */
function share(grams: number, from: ReadonlyMap<number, number>, unknownKey: number): Parts {
  const sorted = partsOf(from).filter(([, weight]) => weight > 0);
  if (sorted.length === 0) return [[unknownKey, grams]];
  const shares = allocate(
    grams,
    sorted.map(([, weight]) => weight),
  );
  return sorted
    .map(([key], index) => [key, shares[index] ?? 0] as const)
    .filter(([, part]) => part !== 0);
}

/** Parts of an amount in a holding's own proportion; unknown and not heated when it is empty. */
export function inProportion(grams: number, holding: Holding): Composition {
  return {
    O: share(grams, holding.O, UNKNOWN_ORIGIN),
    H: share(grams, holding.H, 0),
  };
}

/** Takes grams of one material out of the pool. */
function takeMaterial(pool: Pool, materialId: number, grams: number): Composition {
  const left = poolOf(pool, materialId);
  const parts = inProportion(grams, left);
  addTo(left, -grams, { O: negated(parts.O), H: negated(parts.H) });
  return parts;
}

/** How much of each material an amount takes from what is left of the pool; ties go to the lower material. */
export function byMaterial(pool: Pool, grams: number): [materialId: number, grams: number][] {
  const materials = [...pool].filter(([, left]) => left.grams > 0).sort((a, b) => a[0] - b[0]);
  const shares = allocate(
    grams,
    materials.map(([, left]) => left.grams),
  );
  return materials
    .map(([materialId], index): [number, number] => [materialId, shares[index] ?? 0])
    .filter(([, part]) => part !== 0);
}

function heated(parts: Parts): Parts {
  const map = new Map<number, number>();
  addParts(
    map,
    parts.map(([times, grams]) => [Math.min(times + 1, 3), grams] as const),
  );
  return partsOf(map);
}

/** The materials and parts that one output takes, and from which material each came. */
export type Taken = { materialId: number; grams: number; parts: Composition };

/**
 * Takes one output from the pool.
 *
 * @param own the output's own material when it keeps its row (a run, or a lot filled from a run): that comes first
 */
export function takeFromPool(pool: Pool, grams: number, own: number | null): Taken[] {
  const taken: Taken[] = [];
  let rest = grams;
  if (own !== null) {
    const back = Math.min(rest, Math.max(pool.get(own)?.grams ?? 0, 0));
    if (back > 0) {
      taken.push({ materialId: own, grams: back, parts: takeMaterial(pool, own, back) });
      rest -= back;
    }
  }
  if (rest > 0) {
    for (const [materialId, part] of byMaterial(pool, rest)) {
      taken.push({ materialId, grams: part, parts: takeMaterial(pool, materialId, part) });
    }
  }
  return taken;
}

/** One line's parts from all that it took. */
export function joined(taken: readonly Taken[], heats: boolean): Composition {
  const sums: Record<Dimension, Map<number, number>> = { O: new Map(), H: new Map() };
  for (const piece of taken) {
    addParts(sums.O, piece.parts.O);
    addParts(sums.H, heats ? heated(piece.parts.H) : piece.parts.H);
  }
  return { O: partsOf(sums.O), H: partsOf(sums.H) };
}
