import { describe, expect, it } from "vitest";
import { formatStep } from "@/lib/core/mass";
import { sameName, tidyName } from "@/lib/core/names";

describe("names", () => {
  it("are stored without space around them and with single spaces inside", () => {
    expect(tidyName("  Harbour \t Road\u00a0 Library ")).toBe("Harbour Road Library");
  });

  it.each([
    ["Harbour Road", "harbour  ROAD ", true],
    ["Caf\u00e9", "Cafe\u0301", true],
    ["Cafe", "Caf\u00e9", false],
    ["Mill School", "Mill Schools", false],
  ])("%j and %j: %s", (one, other, same) => {
    expect(sameName(one, other)).toBe(same);
  });
});

describe("formatStep", () => {
  it.each([
    [5_000, "5 g"],
    [500, "0.5 g"],
    [1, "0.001 g"],
    [20_000_000, "20 kg"],
    [1_500_000, "1.5 kg"],
    [999_999, "999.999 g"],
  ])("%i mg: %s", (milligrams, text) => {
    expect(formatStep(milligrams).replace("\u00a0", " ")).toBe(text);
  });
});
