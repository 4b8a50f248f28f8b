import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { allocate } from "@/lib/core/allocate";

const weights = fc
  .array(fc.integer({ min: 0, max: 2_000_000_000 }), { minLength: 1, maxLength: 40 })
  .filter((list) => list.some((weight) => weight > 0));
const total = fc.integer({ min: -3_000_000_000, max: 3_000_000_000 });
const sum = (list: readonly number[]) => list.reduce((left, right) => left + right, 0);

describe("allocate", () => {
  it("always adds up to the total", () => {
    fc.assert(
      fc.property(total, weights, (amount, list) => {
        expect(sum(allocate(amount, list)) + 0).toBe(amount + 0);
      }),
      { numRuns: 1000 },
    );
  });

  it("gives each less than one from its exact share (checked in BigInt), nothing to a weight of zero", () => {
    fc.assert(
      fc.property(total, weights, (amount, list) => {
        const whole = list.reduce((left, right) => left + BigInt(right), 0n);
        allocate(amount, list).forEach((share, index) => {
          const off = BigInt(share) * whole - BigInt(amount) * BigInt(list[index] ?? 0);
          expect(off < whole && off > -whole).toBe(true);
          if (list[index] === 0) expect(share).toBe(0);
          else expect(share === 0 || share > 0 === amount > 0).toBe(true);
        });
      }),
      { numRuns: 1000 },
    );
  });

  it("gives the odd ones to the largest remainders, ties to the earlier (checked by sorting exact fractions)", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 10_000_000 }), weights, (amount, list) => {
        const whole = list.reduce((left, right) => left + BigInt(right), 0n);
        const exact = list.map((weight, index) => ({
          index,
          floor: (BigInt(amount) * BigInt(weight)) / whole,
          rest: (BigInt(amount) * BigInt(weight)) % whole,
        }));
        let left = BigInt(amount) - exact.reduce((all, { floor }) => all + floor, 0n);
        const expected = exact.map(({ floor }) => floor);
        const ranked = [...exact].sort((a, b) =>
          a.rest === b.rest ? a.index - b.index : a.rest > b.rest ? -1 : 1,
        );
        for (const { index } of ranked) {
          if (left === 0n) break;
          expected[index] = (expected[index] ?? 0n) + 1n;
          left -= 1n;
        }
        expect(allocate(amount, list).map(BigInt)).toEqual(expected);
      }),
      { numRuns: 1000 },
    );
  });

  it("is the same every time, and mirrors below zero", () => {
    fc.assert(
      fc.property(total, weights, (amount, list) => {
        expect(allocate(amount, list)).toEqual(allocate(amount, list));
        expect(allocate(-amount, list).map((share) => share + 0)).toEqual(
          allocate(amount, list).map((share) => -share + 0),
        );
      }),
    );
  });

  it("is exact where the product passes 2^53", () => {
    expect(allocate(9_000_000_000_001, [2_000_000_001, 2_000_000_001])).toEqual([
      4_500_000_000_001, 4_500_000_000_000,
    ]);
    // 6 750 000 000 000.75 and 2 250 000 000 000.25
    expect(allocate(9_000_000_000_001, [3_000_000_000, 1_000_000_000])).toEqual([
      6_750_000_000_001, 2_250_000_000_000,
    ]);
  });

  it.each([
    [100, [1, 1, 1], [34, 33, 33]],
    [3151, [2160, 1000], [2154, 997]],
    [1500, [2154, 997], [1025, 475]],
    [0, [0, 0], [0, 0]],
    [0, [], []],
    [-10, [1, 2], [-3, -7]],
    [7, [7], [7]],
  ])("splits %i by %j into %j", (amount, list, expected) => {
    expect(allocate(amount, list)).toEqual(expected);
  });

  it.each([
    [1, []],
    [1, [0, 0]],
    [0.5, [1]],
    [1, [-1, 2]],
    [1, [0.5]],
    [NaN, [1]],
    [1, [Number.MAX_SAFE_INTEGER, Number.MAX_SAFE_INTEGER]],
  ])("refuses to split %d by %j", (amount, list) => {
    expect(() => allocate(amount, list)).toThrow(RangeError);
  });
});
