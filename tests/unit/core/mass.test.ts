import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  formatKg,
  formatMilligrams,
  grams,
  gramsDelta,
  gramsFromMilligrams,
  kgCell,
  readMass,
  type MassUnit,
} from "@/lib/core/mass";

const unit = fc.constantFrom<MassUnit>("kg", "g");
const MOST = 100_000_000_000;

describe("grams", () => {
  it("takes whole numbers of zero or more, and nothing else", () => {
    expect(grams(0)).toBe(0);
    expect(grams(2160)).toBe(2160);
    for (const wrong of [-1, 0.5, NaN, Infinity, 2 ** 53]) {
      expect(() => grams(wrong)).toThrow(RangeError);
    }
  });

  it("has a signed sibling", () => {
    expect(gramsDelta(-8)).toBe(-8);
    for (const wrong of [0.5, NaN, -(2 ** 53)]) {
      expect(() => gramsDelta(wrong)).toThrow(RangeError);
    }
  });
});

describe("gramsFromMilligrams", () => {
  it.each([
    [0, 0],
    [499, 0],
    [500, 1],
    [1499, 1],
    [-499, 0],
    [-500, -1],
    [-1500, -2],
    [2_160_499, 2160],
  ])("%i mg is %i g", (milligrams, expected) => {
    // Compared by value: a rounded negative may be -0.
    expect(gramsFromMilligrams(milligrams) + 0).toBe(expected);
  });

  it("is never more than half a gram away, and odd", () => {
    fc.assert(
      fc.property(fc.integer({ min: -MOST, max: MOST }), (milligrams) => {
        const rounded = gramsFromMilligrams(milligrams);
        expect(Math.abs(rounded * 1000 - milligrams)).toBeLessThanOrEqual(500);
        expect(gramsFromMilligrams(-milligrams) + 0).toBe(-rounded + 0);
      }),
    );
  });
});

/** A second way to read a decimal: the digits as one BigInt, moved by the places. */
function model(whole: string, fraction: string, unitOfText: MassUnit): bigint | null {
  const places = unitOfText === "kg" ? 6 : 3;
  const digits = fraction.padEnd(places, "0");
  if (/[1-9]/.test(digits.slice(places))) return null;
  return BigInt(whole || "0") * 10n ** BigInt(places) + BigInt(digits.slice(0, places) || "0");
}

describe("readMass", () => {
  const digit = fc.constantFrom(...Array.from("0123456789"));
  const whole = fc.string({ unit: digit, minLength: 0, maxLength: 9 });
  const fraction = fc.string({ unit: digit, minLength: 0, maxLength: 8 });

  it("equals a model in BigInt for every text with a point", () => {
    fc.assert(
      fc.property(whole, fraction, unit, (head, tail, asked) => {
        fc.pre(head !== "" || tail !== "");
        const reading = readMass(`${head}.${tail}`, asked);
        const expected = model(head, tail, asked);
        if (expected === null) expect(reading).toEqual({ ok: false, problem: "too-precise" });
        else if (expected > BigInt(MOST))
          expect(reading).toEqual({ ok: false, problem: "too-large" });
        else expect(reading).toEqual({ ok: true, milligrams: Number(expected) });
      }),
      { numRuns: 2000 },
    );
  });

  it("reads a comma as a point, except where it could mark a thousand", () => {
    fc.assert(
      fc.property(
        fc.string({ unit: digit, minLength: 1, maxLength: 6 }),
        fc.string({ unit: digit, minLength: 1, maxLength: 6 }),
        unit,
        (head, tail, asked) => {
          const reading = readMass(`${head},${tail}`, asked);
          // A group of thousands begins with one to three digits, the first of them not 0.
          if (tail.length === 3 && /^[1-9]\d{0,2}$/.test(head)) {
            expect(reading).toEqual({ ok: false, problem: "could-be-thousands" });
          } else expect(reading).toEqual(readMass(`${head}.${tail}`, asked));
        },
      ),
    );
  });

  it.each([
    ["2.340", "kg", 2_340_000],
    ["2,34", "kg", 2_340_000],
    ["12,45", "kg", 12_450_000],
    [" 2.34 kg ", "g", 2_340_000],
    ["340 g", "kg", 340_000],
    ["340G", "kg", 340_000],
    ["0,5", "g", 500],
    ["0,340", "kg", 340_000],
    ["1234,567", "g", 1_234_567],
    [".5", "kg", 500_000],
    ["5.", "kg", 5_000_000],
    ["0", "kg", 0],
    ["1 234.5", "g", 1_234_500],
    ["1\u202f234,5", "g", 1_234_500],
    ["100000", "kg", MOST],
    ["1.2340000000", "kg", 1_234_000],
  ] as const)('reads "%s" (%s) as %i mg', (text, asked, milligrams) => {
    expect(readMass(text, asked)).toEqual({ ok: true, milligrams });
  });

  it.each([
    ["", "empty"],
    ["   ", "empty"],
    ["1,234", "could-be-thousands"],
    ["12,345 kg", "could-be-thousands"],
    ["1,234,567", "could-be-thousands"],
    ["1.234,5", "could-be-thousands"],
    ["1,234.5", "could-be-thousands"],
    ["-1", "negative"],
    ["\u22121.5", "negative"],
    ["1.2345678", "too-precise"],
    ["100000.001", "too-large"],
    ["99999999999999999999", "too-large"],
    ["two", "not-a-number"],
    ["1e3", "not-a-number"],
    ["0x10", "not-a-number"],
    [".", "not-a-number"],
    ["kg", "empty"],
    ["Infinity", "not-a-number"],
    ["1/2", "not-a-number"],
  ] as const)('refuses "%s": %s', (text, problem) => {
    expect(readMass(text, "kg")).toEqual({ ok: false, problem });
  });

  it("never throws and never gives a fraction", () => {
    fc.assert(
      fc.property(fc.string(), unit, (text, asked) => {
        const reading = readMass(text, asked);
        if (reading.ok) expect(Number.isSafeInteger(reading.milligrams)).toBe(true);
      }),
    );
  });
});

describe("showing a mass", () => {
  const anyGrams = fc.integer({ min: -10_000_000_000, max: 10_000_000_000 });

  it.each([
    [2160, 3, "2.160"],
    [-60, 3, "\u22120.060"],
    [1_234_567, 3, "1\u2009234.567"],
    [1_234_567, 0, "1\u2009235"],
    [1499, 0, "1"],
    [1500, 0, "2"],
    [-4, 2, "0.00"],
    [-5, 2, "\u22120.01"],
    [949, 1, "0.9"],
    [950, 1, "1.0"],
    [999_999, 2, "1\u2009000.00"],
  ] as const)("%i g with %i places is %s kg", (value, places, expected) => {
    expect(formatKg(value, places)).toBe(expected);
  });

  it("is what a person can type again", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 99_999_999 }), (value) => {
        expect(readMass(formatKg(value), "kg")).toEqual({ ok: true, milligrams: value * 1000 });
      }),
    );
  });

  it("is a plain number in a CSV cell, exact to the gram", () => {
    expect([2160, -60, 0, -1_000_001].map(kgCell)).toEqual([
      "2.160",
      "-0.060",
      "0.000",
      "-1000.001",
    ]);
    fc.assert(
      fc.property(anyGrams, (value) => {
        expect(kgCell(value)).toMatch(/^-?\d+\.\d{3}$/);
        expect(BigInt(kgCell(value).replace(".", ""))).toBe(BigInt(value));
      }),
    );
  });

  it("shows milligrams with the decimals they need", () => {
    expect([2_160_000, 2_500, 1, 2_345_670, -1_500_000].map(formatMilligrams)).toEqual([
      "2.160",
      "0.0025",
      "0.000001",
      "2.34567",
      "\u22121.500",
    ]);
  });
});
