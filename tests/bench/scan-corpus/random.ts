/** Numbers that look random and are the same for the same seed on every machine. */
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

/** Mulberry32 over an FNV-1a hash of the seed's text. */
export function randomOf(seed: string): Random {
  let state = 0x811c9dc5;
  for (let at = 0; at < seed.length; at += 1) {
    state = Math.imul(state ^ seed.charCodeAt(at), 0x01000193);
  }
  const next = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
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
