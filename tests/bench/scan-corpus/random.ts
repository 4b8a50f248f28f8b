/** Numbers that look random and are the same for the same seed on every machine. */
import { randomFrom, seedOf } from "@/lib/core/random";

export type Random = {
  /** 0 up to, not including, 1. */
  next: () => number;
  between: (least: number, most: number) => number;
  /** A whole number from 0 up to, not including, `below`. */
  whole: (below: number) => number;
  /** Normally distributed, mean 0, deviation 1. */
  normal: () => number;
  pick: <T>(from: readonly T[]) => T;
};

/** The stream of a seed's text. */
export function randomOf(seed: string): Random {
  const next = randomFrom(seedOf(seed));
  return {
    next,
    between: (least, most) => least + next() * (most - least),
    whole: (below) => Math.floor(next() * below),
    // Box and Muller; 1 - next() is never 0.
    normal: () => Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next()),
    pick: (from) => {
      const chosen = from[Math.floor(next() * from.length)];
      if (chosen === undefined) throw new RangeError("nothing to pick from");
      return chosen;
    },
  };
}

/** Smooth noise from 0 to 1 over a plane: random heights on a grid of side 1, blended between. */
export function smoothNoise(random: Random): (x: number, y: number) => number {
  const side = 64;
  const heights = Float32Array.from({ length: side * side }, () => random.next());
  const height = (column: number, row: number): number =>
    heights[(row & (side - 1)) * side + (column & (side - 1))] ?? 0;
  return (x, y) => {
    const [column, row] = [Math.floor(x), Math.floor(y)];
    const [right, down] = [x - column, y - row];
    const across = right * right * (3 - 2 * right);
    const along = down * down * (3 - 2 * down);
    const top = height(column, row) * (1 - across) + height(column + 1, row) * across;
    const foot = height(column, row + 1) * (1 - across) + height(column + 1, row + 1) * across;
    return top * (1 - along) + foot * along;
  };
}
