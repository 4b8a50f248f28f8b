/**
 * Colour science against published values.
 *
 * ciede2000_pairs.csv: the 34 pairs of Sharma, Wu and Dalal, Color Research and Application 30(1) 2005,
 * Table 1, as two colour libraries give them. srgb_to_lab_d65.csv: sRGB (IEC 61966-2-1) in CIELAB, D65; its
 * columns for the four-digit matrix of the standard differ by up to 0.02, so the tolerance is 0.03.
 */
import { describe, expect, test } from "vitest";
import { colourDifference, labOfHex, labOfRgb } from "@/lib/core/colour";
import { referenceTable } from "../support/reference-table";

const pairs = referenceTable("ciede2000_pairs");
const colours = referenceTable("srgb_to_lab_d65");

/**
 * In pair 14 the two hues are exactly half a turn apart, so that rounding decides on which side of the circle
 * their mean lies. Both values are correct.
 */
const EITHER: Readonly<Record<string, readonly number[]>> = { "14": [4.8045, 4.7461] };

describe("CIEDE2000", () => {
  test("all 34 pairs were read", () => {
    expect(pairs.map(({ pair }) => Number(pair))).toEqual(
      Array.from({ length: 34 }, (_, at) => at + 1),
    );
  });

  test.each(pairs)("pair $pair is $dE00", (row) => {
    const one = { l: Number(row.L1), a: Number(row.a1), b: Number(row.b1) };
    const other = { l: Number(row.L2), a: Number(row.a2), b: Number(row.b2) };
    const accepted = EITHER[row.pair ?? ""] ?? [Number(row.dE00)];
    for (const difference of [colourDifference(one, other), colourDifference(other, one)]) {
      expect(accepted).toContain(Number(difference.toFixed(4)));
    }
  });
});

describe("sRGB in CIELAB, D65", () => {
  test("the table was read", () => {
    expect(colours.length).toBeGreaterThanOrEqual(10);
  });

  test.each(colours)("$hex", (row) => {
    const lab = labOfHex(row.hex ?? "");
    if (!lab) throw new Error(`${row.hex} was not read`);
    const of = (l?: string, a?: string, b?: string) => [Number(l), Number(a), Number(b)];
    for (const expected of [
      of(row.L_7digit_matrix, row.a, row.b),
      of(row.L_4digit_IEC_matrix, row.a4, row.b4),
    ]) {
      for (const [at, value] of [lab.l, lab.a, lab.b].entries()) {
        expect(Math.abs(value - (expected[at] ?? Number.NaN))).toBeLessThanOrEqual(0.03);
      }
    }
    const channels = [1, 3, 5].map((at) => Number.parseInt((row.hex ?? "").slice(at, at + 2), 16));
    expect(labOfRgb(channels[0] ?? 0, channels[1] ?? 0, channels[2] ?? 0)).toEqual(lab);
  });

  test("red, green and blue to the two published decimals", () => {
    const published = colours.filter((row) => row["published_2dp_L/a/b"]);
    expect(published.length).toBeGreaterThanOrEqual(5);
    for (const row of published) {
      const expected = (row["published_2dp_L/a/b"] ?? "").split("/").map(Number);
      const lab = labOfHex(row.hex ?? "");
      for (const [at, value] of [lab?.l, lab?.a, lab?.b].entries()) {
        expect(Math.abs((value ?? Number.NaN) - (expected[at] ?? Number.NaN))).toBeLessThan(0.011);
      }
    }
  });
});
