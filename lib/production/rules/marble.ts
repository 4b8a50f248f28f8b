/**
 * Invariant: in the picture of a blend each colour covers the area of its share, to the pixel (largest remainder); the
 * same shares, folds and seed give the same picture.
 *
 * A field of bent stripes is drawn by seeded value noise whose coordinates are bent by noise again, as dough is folded;
 * the more it is folded, the more and the thinner the stripes. Pixels sorted by the field are then dealt to the colours.
 */
import { allocate } from "@/lib/core/allocate";
import { randomFrom } from "@/lib/core/random";

const LATTICE = 64;
const smooth = (t: number): number => t * t * (3 - 2 * t);

/** Noise on a lattice that repeats, in [0, 1), smooth between its knots. */
function noiseOf(random: () => number): (x: number, y: number) => number {
  const knots = Float64Array.from({ length: LATTICE * LATTICE }, random);
  const knot = (x: number, y: number): number =>
    knots[(y & (LATTICE - 1)) * LATTICE + (x & (LATTICE - 1))] ?? 0;
  return (x, y) => {
    const left = Math.floor(x);
    const top = Math.floor(y);
    const across = smooth(x - left);
    const down = smooth(y - top);
    const upper = knot(left, top) + (knot(left + 1, top) - knot(left, top)) * across;
    const lower = knot(left, top + 1) + (knot(left + 1, top + 1) - knot(left, top + 1)) * across;
    return upper + (lower - upper) * down;
  };
}

/** The field of one picture, a value a pixel; shares only deal it out, so it is kept while they change. */
export function marbleField(
  seed: number,
  folded: number,
  width: number,
  height: number,
): Float64Array {
  const random = randomFrom(seed);
  const [bendX, bendY, wave] = [noiseOf(random), noiseOf(random), noiseOf(random)];
  const turns = 1.2 + folded / 16;
  const bend = 1.2 + folded / 45;
  const field = new Float64Array(width * height);
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      // The same picture at every size: coordinates go by the height.
      const across = (x / height) * 2.2;
      const down = (y / height) * 3;
      const dx = bendX(across, down) + 0.5 * bendX(across * 2.1 + 9, down * 2.1);
      const dy = bendY(across + 5, down) + 0.5 * bendY(across * 2.3, down * 2.3 + 7);
      const at = wave(across * 0.6 + bend * dx, down + bend * dy);
      const stripe = Math.sin((down * 0.35 + at) * turns * Math.PI);
      field[y * width + x] = stripe + 0.15 * wave(across * 6 + bend * dx, down * 6 + bend * dy);
    }
  }
  return field;
}

/**
 * Deals the pixels of a field to colours.
 *
 * @param weights one for each colour, at least one above zero
 * @returns index of the colour for each pixel
 */
export function dealColours(field: Float64Array, weights: readonly number[]): Uint8Array {
  const order = Uint32Array.from(field.keys()).sort(
    (a, b) => (field[a] ?? 0) - (field[b] ?? 0) || a - b,
  );
  const counts = allocate(field.length, weights);
  const dealt = new Uint8Array(field.length);
  let at = 0;
  counts.forEach((count, colour) => {
    for (const end = at + count; at < end; at += 1) dealt[order[at] ?? 0] = colour;
  });
  return dealt;
}
