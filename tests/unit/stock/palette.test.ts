import { describe, expect, it } from "vitest";
import { colourCode, isReordering } from "@/lib/stock/rules/palette";
import { colourCodeSchema, hexSchema } from "@/lib/stock/contract/palette";
import { FIRST_PALETTE } from "@/lib/stock/terms";

describe("colourCode", () => {
  it.each([
    ["Light blue", [], "light-blue"],
    ["  Sea -- green! ", [], "sea-green"],
    ["Crème brûlée", [], "creme-brulee"],
    ["蓝", [], "colour"],
    ["Blue", ["blue"], "blue-2"],
    ["Blue", ["blue", "blue-2"], "blue-3"],
  ])("%s beside %j: %s", (name, taken, code) => {
    expect(colourCode(name, new Set(taken))).toBe(code);
    expect(colourCodeSchema.parse(code)).toBe(code);
  });

  it("makes codes that addresses can hold, and the first palette's are such", () => {
    for (const { code, hex } of FIRST_PALETTE) {
      expect(colourCodeSchema.parse(code)).toBe(code);
      expect(hexSchema.parse(hex)).toBe(hex);
    }
  });
});

describe("hexSchema", () => {
  it("takes six signs in either case and nothing else", () => {
    expect(hexSchema.parse(" #1F46D6 ")).toBe("#1f46d6");
    for (const wrong of ["1f46d6", "#1f4", "#1f46dg", "#1f46d6ff", "blue", ""]) {
      expect(hexSchema.safeParse(wrong).error?.issues[0]?.message).toBe("not-a-hex");
    }
  });
});

describe("isReordering", () => {
  it.each([
    [["a", "b"], ["b", "a"], true],
    [[], [], true],
    [["a", "b"], ["a"], false],
    [["a", "b"], ["a", "a"], false],
    [["a", "b"], ["a", "c"], false],
  ])("%j as %j: %s", (present, ordered, fine) => {
    expect(isReordering(present, ordered)).toBe(fine);
  });
});
