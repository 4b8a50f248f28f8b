import { describe, expect, test } from "vitest";
import { chipPath, hatchPath } from "@/components/ui/flake-shapes";
import { randomFrom, seedOf } from "@/lib/core/random";

/** Corners of a chip, from its path data: one absolute start, then steps relative to the last corner. */
function corners(path: string): { x: number; y: number }[] {
  expect(path).toMatch(/^M-?\d+ -?\d+l(-?\d+ ?-?\d+ ?)+z$/);
  const numbers = (path.match(/-?\d+/g) ?? []).map(Number);
  const found: { x: number; y: number }[] = [];
  for (let at = 0; at < numbers.length; at += 2) {
    const last = found.at(-1) ?? { x: 0, y: 0 };
    found.push({ x: last.x + (numbers[at] ?? NaN), y: last.y + (numbers[at + 1] ?? NaN) });
  }
  return found;
}

describe("a chip", () => {
  test("is the same for the same seed and another for another", () => {
    const draw = (seed: number) => chipPath(randomFrom(seed), 50, 50, 20);
    expect(draw(1)).toBe(draw(1));
    expect(new Set([1, 2, 3, 4, 5].map(draw)).size).toBe(5);
  });

  test("has five to seven corners within reach of its centre", () => {
    const random = randomFrom(99);
    for (let chip = 0; chip < 500; chip += 1) {
      const found = corners(chipPath(random, 100, 200, 30));
      expect(found.length).toBeGreaterThanOrEqual(5);
      expect(found.length).toBeLessThanOrEqual(7);
      for (const { x, y } of found) expect(Math.hypot(x - 100, y - 200)).toBeLessThanOrEqual(34);
    }
  });

  test("is sometimes hollow and mostly not, as shredded plastic is", () => {
    const random = randomFrom(5);
    const hollow = Array.from({ length: 400 }, () => corners(chipPath(random, 0, 0, 100))).filter(
      (found) => {
        const turns = found.map((here, at) => {
          const next = found[(at + 1) % found.length] ?? here;
          const after = found[(at + 2) % found.length] ?? here;
          return Math.sign(
            (next.x - here.x) * (after.y - next.y) - (next.y - here.y) * (after.x - next.x),
          );
        });
        return turns.includes(1) && turns.includes(-1);
      },
    ).length;
    expect(hollow).toBeGreaterThan(60);
    expect(hollow).toBeLessThan(300);
  });
});

describe("seeds", () => {
  test("numbers stay in [0, 1) and spread over it", () => {
    const random = randomFrom(2026);
    const drawn = Array.from({ length: 2000 }, random);
    expect(drawn.every((number) => number >= 0 && number < 1)).toBe(true);
    const mean = drawn.reduce((sum, number) => sum + number, 0) / drawn.length;
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.03);
  });

  test("a text's seed is FNV-1a (published values for 'a' and 'foobar')", () => {
    expect(seedOf("a")).toBe(0xe40c292c);
    expect(seedOf("foobar")).toBe(0xbf9cf968);
  });
});

test("a hatch covers its box from corner to corner", () => {
  const starts = [...hatchPath(40, 20, 10).matchAll(/M(-?\d+) 20l20 -20/g)].map(([, x]) =>
    Number(x),
  );
  expect(starts[0]).toBe(-20);
  expect(starts.at(-1)).toBeGreaterThanOrEqual(30);
});
