/**
 * What one holder has of one material: grams, and the two compositions that add up to them.
 *
 * Invariant: outside an act under way, grams >= 0, no part is negative, and both the parts by origin and
 * the parts by times heated sum to grams.
 */
import type { Dimension } from "../terms";

/** Grams by key, keys ascending, none zero: origin number for O, times heated for H. */
export type Parts = readonly (readonly [key: number, grams: number])[];
export type Composition = Readonly<Record<Dimension, Parts>>;

export type Holding = { grams: number; O: Map<number, number>; H: Map<number, number> };

export function emptyHolding(): Holding {
  return { grams: 0, O: new Map(), H: new Map() };
}

export function copyHolding(from: Holding): Holding {
  return { grams: from.grams, O: new Map(from.O), H: new Map(from.H) };
}

/** Key under which a holding is kept in a map: holders and materials are positive integers. */
export function holdingKey(holderId: number, materialId: number): string {
  return `${holderId}:${materialId}`;
}

/** Sorted, without zeros. */
export function partsOf(map: ReadonlyMap<number, number>): Parts {
  const found: [number, number][] = [];
  for (const [key, grams] of map) if (grams !== 0) found.push([key, grams]);
  return found.sort((a, b) => a[0] - b[0]);
}

export function addParts(map: Map<number, number>, parts: Parts, sign: 1 | -1 = 1): void {
  for (const [key, grams] of parts) {
    const sum = (map.get(key) ?? 0) + sign * grams;
    if (sum === 0) map.delete(key);
    else map.set(key, sum);
  }
}

/** Puts a signed amount with its parts into a holding. */
export function addTo(holding: Holding, grams: number, parts: Composition): void {
  holding.grams += grams;
  addParts(holding.O, parts.O);
  addParts(holding.H, parts.H);
}

export function negated(parts: Parts): Parts {
  return parts.map(([key, grams]) => [key, -grams] as const);
}

/** Is everything at or above zero? */
export function isSound(holding: Holding): boolean {
  if (holding.grams < 0) return false;
  for (const grams of holding.O.values()) if (grams < 0) return false;
  for (const grams of holding.H.values()) if (grams < 0) return false;
  return true;
}
