import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  formatMeasure,
  maybeMeasureSchema,
  measureSchema,
  unitOf,
  type Quantity,
} from "@/lib/core/measure";

const QUANTITIES: readonly Quantity[] = ["length", "volume", "mass", "share", "money", "density"];
const problemOf = (quantity: Quantity, typed: unknown, least?: number): string | undefined =>
  measureSchema(quantity, least).safeParse(typed).error?.issues[0]?.message;

describe("what is typed", () => {
  it.each<[Quantity, string, number]>([
    ["length", "200", 200_000],
    ["length", "20 cm", 200_000],
    ["length", "20cm", 200_000],
    ["length", "2,5 mm", 2_500],
    ["length", "2.5", 2_500],
    ["length", " 3 ", 3_000],
    ["volume", "150 cm³", 150_000],
    ["volume", "150 cm3", 150_000],
    ["volume", "12,5 ml", 12_500],
    ["mass", "26", 26_000],
    ["mass", "26,04 g", 26_040],
    ["mass", "0,262 kg", 262_000],
    ["mass", "0.000005 kg", 5],
    ["mass", "1.234", 1_234],
    ["share", "5 %", 50],
    ["share", "12,5", 125],
    ["money", "4,50", 450],
    ["money", "4", 400],
    ["density", "0,955 g/cm³", 955],
  ])("%s: %j is %i", (quantity, typed, value) => {
    expect(measureSchema(quantity).parse(typed)).toBe(value);
  });

  it.each<[Quantity, unknown, string]>([
    ["mass", "", "empty"],
    ["mass", "   ", "empty"],
    ["mass", "g", "empty"],
    ["mass", "1,234", "could-be-thousands"],
    ["length", "1,234 cm", "could-be-thousands"],
    ["money", "1.234.567", "could-be-thousands"],
    ["mass", "-3", "negative"],
    ["mass", "\u22123 g", "negative"],
    ["money", "4.505", "too-precise"],
    ["share", "5.25", "too-precise"],
    ["length", "0.0005", "too-precise"],
    ["density", "0.9555", "too-precise"],
    ["mass", "some", "not-a-number"],
    ["mass", "26 mm", "not-a-number"],
    ["length", "2 kg", "not-a-number"],
    ["mass", 2.5, "not-a-number"],
    ["mass", "0", "out-of-range"],
    ["mass", 0, "out-of-range"],
    ["mass", -1, "out-of-range"],
    ["mass", "1000.001 kg", "out-of-range"],
    ["mass", "9999999999 kg", "too-large"],
  ])("%s: %j is refused as %s", (quantity, typed, code) => {
    expect(problemOf(quantity, typed)).toBe(code);
  });

  it("takes zero where zero is a value", () => {
    expect(measureSchema("money", 0).parse("0,00")).toBe(0);
    expect(problemOf("money", "0,00")).toBe("out-of-range");
  });

  it("does not read a text without end", () => {
    expect(measureSchema("mass").safeParse("1".repeat(41)).success).toBe(false);
  });
});

describe("what may be left empty", () => {
  it("is null then, and keeps the codes of what is wrong otherwise", () => {
    const schema = maybeMeasureSchema("mass");
    for (const empty of ["", "  ", null]) expect(schema.parse(empty)).toBeNull();
    expect(schema.parse("26,5")).toBe(26_500);
    expect(schema.parse(26_500)).toBe(26_500);
    for (const [typed, code] of [
      ["1,234", "could-be-thousands"],
      ["-1", "negative"],
      ["x", "not-a-number"],
    ]) {
      expect(schema.safeParse(typed).error?.issues).toMatchObject([{ message: code }]);
    }
  });
});

describe("what a field shows", () => {
  it.each<[Quantity, number | null, string]>([
    ["length", 200_000, "200"],
    ["length", 2_500, "2.5"],
    ["length", 5, "0.005"],
    ["mass", 26_040, "26.04"],
    ["share", 125, "12.5"],
    ["money", 450, "4.50"],
    ["money", 400, "4.00"],
    ["density", 955, "0.955"],
    ["mass", null, ""],
  ])("%s: %j is %j", (quantity, value, text) => {
    expect(formatMeasure(value, quantity)).toBe(text);
  });

  it("reads back as the same, with its unit and without", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...QUANTITIES),
        fc.integer({ min: 1, max: 1_000_000_000 }),
        (quantity, value) => {
          const text = formatMeasure(value, quantity);
          expect(measureSchema(quantity).parse(text)).toBe(value);
          expect(measureSchema(quantity).parse(`${text} ${unitOf(quantity)}`)).toBe(value);
        },
      ),
    );
  });
});
