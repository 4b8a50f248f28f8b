/** A small seeded generator, so that the demo is the same every time; good enough for a story. */
import { randomFrom } from "@/lib/core/random";

export type Random = {
  /** From 0 up to, not including, 1. */
  next: () => number;
  /** A whole number from 0 up to, not including, `below`. */
  int: (below: number) => number;
  chance: (probability: number) => boolean;
  pick: <T>(from: readonly T[]) => T;
  /** By weight. */
  weighted: <T>(from: readonly (readonly [T, number])[]) => T;
  /** Normal, by Box and Muller. */
  normal: (mean: number, deviation: number) => number;
  bytes: (count: number) => Uint8Array;
};

export function seeded(seed: number): Random {
  const next = randomFrom(seed);
  const int = (below: number): number => Math.floor(next() * below);
  return {
    next,
    int,
    chance: (probability) => next() < probability,
    pick: (from) => {
      const found = from[int(from.length)];
      if (found === undefined) throw new RangeError("nothing to pick from");
      return found;
    },
    weighted: (from) => {
      let left = next() * from.reduce((sum, [, weight]) => sum + weight, 0);
      for (const [value, weight] of from) {
        left -= weight;
        if (left < 0) return value;
      }
      const last = from.at(-1);
      if (!last) throw new RangeError("nothing to pick from");
      return last[0];
    },
    normal: (mean, deviation) =>
      mean + deviation * Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next()),
    bytes: (count) => Uint8Array.from({ length: count }, () => int(256)),
  };
}
