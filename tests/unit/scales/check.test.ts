import { describe, expect, it } from "vitest";
import { dayState, judgeCheck } from "@/lib/scales/rules/check";
import type { ScaleSpec } from "@/lib/scales/rules/scale";

const hanging: ScaleSpec = {
  class: "none",
  maxMilligrams: 50_000_000,
  eMilligrams: null,
  dMilligrams: 50_000,
  statedAccuracyMilligrams: 100_000,
};

describe("a check of a scale that is not verified", () => {
  it("is judged by what its maker states", () => {
    expect(judgeCheck(hanging, 10_000_000, 10_100_000)).toEqual({
      errorMilligrams: 100_000,
      limitMilligrams: 100_000,
      passed: true,
    });
    expect(judgeCheck(hanging, 10_000_000, 9_850_000)).toEqual({
      errorMilligrams: -150_000,
      limitMilligrams: 100_000,
      passed: false,
    });
  });
});

describe("how a scale stands on a day", () => {
  it.each([
    { passed: [], cleared: false, state: "not-checked" },
    { passed: [true], cleared: false, state: "confirmed" },
    { passed: [false], cleared: false, state: "failed-once" },
    { passed: [false, true], cleared: false, state: "confirmed" },
    { passed: [false, false], cleared: false, state: "failed" },
    // Good in the morning, knocked over at noon: it may be repeated once again.
    { passed: [true, false], cleared: false, state: "failed-once" },
    { passed: [true, false, false], cleared: false, state: "failed" },
    { passed: [false, true, false], cleared: false, state: "failed-once" },
    { passed: [], cleared: true, state: "cleared" },
    { passed: [false, false], cleared: true, state: "cleared" },
  ] as const)("$passed, cleared $cleared: $state", ({ passed, cleared, state }) => {
    expect(dayState(passed, cleared)).toBe(state);
  });
});
