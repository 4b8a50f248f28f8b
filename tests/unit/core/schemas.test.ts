import { describe, expect, it } from "vitest";
import {
  codeSchema,
  daySchema,
  idSchema,
  instantSchema,
  lineSchema,
  milligramsSchema,
  requestIdSchema,
} from "@/lib/core/schemas";

const messages = (result: { success: boolean; error?: { issues: { message: string }[] } }) =>
  result.error?.issues.map((issue) => issue.message);

/**
 * Check character of seven zeros by hand: p = 36, doubled 72, modulo 37 = 35; then 33, 29, 21, 5, 10, 20.
 * (37 − 20) modulo 36 = 17, the symbol H.
 */
const ZEROS = "0000000H";

describe("shared schemas", () => {
  it("take ids that are UUIDv7 in lower case, and nothing else", () => {
    const id = "017f22e2-79b0-7cc3-98c4-dc0c0c07398f";
    expect(idSchema<"bag">().parse(id)).toBe(id);
    expect(requestIdSchema.parse(id)).toBe(id);
    for (const wrong of [id.toUpperCase(), "1", "", 7]) {
      expect(requestIdSchema.safeParse(wrong).success).toBe(false);
    }
    expect(messages(requestIdSchema.safeParse("1"))).toEqual(["not-an-id"]);
  });

  it("take days of the calendar", () => {
    expect(daySchema.parse("2024-02-29")).toBe("2024-02-29");
    expect(messages(daySchema.safeParse("2026-02-29"))).toEqual(["not-a-day"]);
  });

  it("take whole milliseconds and milligrams of a sensible size", () => {
    expect(instantSchema.parse(0)).toBe(0);
    expect(milligramsSchema.parse(100_000_000_000)).toBe(100_000_000_000);
    for (const wrong of [-1, 0.5, "1", null, Infinity]) {
      expect(instantSchema.safeParse(wrong).success).toBe(false);
      expect(milligramsSchema.safeParse(wrong).success).toBe(false);
    }
    expect(milligramsSchema.safeParse(100_000_000_001).success).toBe(false);
  });

  it("give a code in its stored form, or why not", () => {
    expect(codeSchema.parse(" 0000-000h ")).toBe(ZEROS);
    expect(messages(codeSchema.safeParse("0000-000"))).toEqual(["wrong-length"]);
    expect(messages(codeSchema.safeParse("!"))).toEqual(["wrong-symbol"]);
    expect(messages(codeSchema.safeParse(""))).toEqual(["empty"]);
    expect(messages(codeSchema.safeParse("0000-0000"))).toEqual(["wrong-check"]);
  });

  it("trim a line and keep it short", () => {
    expect(lineSchema(5).parse("  abc ")).toBe("abc");
    expect(messages(lineSchema(5).safeParse("   "))).toEqual(["empty"]);
    expect(messages(lineSchema(5).safeParse("abcdef"))).toEqual(["too-long"]);
  });
});
