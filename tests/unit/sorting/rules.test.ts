import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { judgeUndo, undoUntil } from "@/lib/core/undo";
import { loadsOf, toleranceOf } from "@/lib/scales/rules/loads";
import { judgeSum, sortedAt } from "@/lib/sorting/rules/table";
import type { ScaleSpec } from "@/lib/scales/rules/scale";

/** Class III, e = d = 5 g: in service ± 5 g up to 2.5 kg, ± 10 g up to 10 kg. */
const scale: ScaleSpec = {
  class: "III",
  maxMilligrams: 30_000_000,
  eMilligrams: 5_000,
  dMilligrams: 5_000,
  statedAccuracyMilligrams: null,
};
const pan = (grossMilligrams: number) => ({
  grossMilligrams,
  containerId: null,
  containerTareMilligrams: 0,
  sackId: null,
  sackTareMilligrams: 0,
});
const NO = { cause: null, confirmedAbove: false };

describe("the readings behind a weighing", () => {
  it("are the gross and each tare from the list, not a typed one", () => {
    const typed = { ...pan(1_000_000), containerTareMilligrams: 100_000 };
    expect(loadsOf(typed, scale)).toHaveLength(1);
    const listed = { ...typed, containerId: "c", sackId: "s", sackTareMilligrams: 20_000 };
    expect(loadsOf(listed, scale).map((load) => load.loadMilligrams)).toEqual([
      1_000_000, 100_000, 20_000,
    ]);
  });
});

describe("the tolerance", () => {
  it("is 2 u, by hand: five readings of ± 5 g give 2 · 5 · √5 / √3 = 12.91 g", () => {
    const loads = [2_160_000, 1_296_000, 518_000, 230_000, 108_000].flatMap((load) =>
      loadsOf(pan(load), scale),
    );
    expect(toleranceOf(loads)).toBe(12_910);
  });

  it("is never below one display step", () => {
    expect(toleranceOf([])).toBe(0);
    const fine = {
      ...scale,
      class: "none" as const,
      eMilligrams: null,
      statedAccuracyMilligrams: 100,
    };
    expect(toleranceOf(loadsOf(pan(1_000_000), fine))).toBe(5_000);
  });
});

describe("the sum of piles and rejects", () => {
  it("is within while the scale can explain it, on both sides and on the edge", () => {
    expect(judgeSum(2160, 2152, 12_910, NO)).toEqual({ kind: "within", differenceGrams: 8 });
    expect(judgeSum(2160, 2172, 12_910, NO)).toEqual({ kind: "within", differenceGrams: -12 });
    expect(judgeSum(2160, 2148, 12_000, NO).kind).toBe("within");
    expect(judgeSum(2160, 2147, 12_000, NO).kind).toBe("needs-cause");
  });

  it("asks for a cause of what is missing, and takes it", () => {
    expect(judgeSum(2000, 1900, 10_000, NO)).toEqual({ kind: "needs-cause", differenceGrams: 100 });
    expect(judgeSum(2000, 1900, 10_000, { cause: "liquid", confirmedAbove: true })).toEqual({
      kind: "loss",
      differenceGrams: 100,
      cause: "liquid",
    });
  });

  it("asks once about a surplus, whatever its size; a cause does not explain it", () => {
    expect(judgeSum(1000, 1050, 10_000, { cause: "dirt", confirmedAbove: false }).kind).toBe(
      "needs-check",
    );
    expect(judgeSum(1000, 9000, 10_000, { cause: null, confirmedAbove: true })).toEqual({
      kind: "surplus",
      differenceGrams: -8000,
    });
  });

  it("does not use a cause within the tolerance", () => {
    expect(judgeSum(1000, 995, 10_000, { cause: "dirt", confirmedAbove: true }).kind).toBe(
      "within",
    );
  });

  it("always accounts for the whole net", () => {
    const grams = fc.integer({ min: 0, max: 40_000 });
    fc.assert(
      fc.property(
        grams,
        grams,
        fc.integer({ min: 0, max: 60_000 }),
        fc.boolean(),
        (net, sum, tolerance, sure) => {
          const verdict = judgeSum(net, sum, tolerance, {
            cause: sure ? "dirt" : null,
            confirmedAbove: sure,
          });
          expect(sum + verdict.differenceGrams).toBe(net);
          if (sure) expect(["within", "loss", "surplus"]).toContain(verdict.kind);
        },
      ),
    );
  });
});

describe("when a bag was sorted", () => {
  it("lies between its weigh-in and now", () => {
    const [weighed, now] = [instant(1000), instant(5000)];
    expect(sortedAt(instant(3000), weighed, now)).toBe(3000);
    expect(sortedAt(instant(10), weighed, now)).toBe(1000);
    expect(sortedAt(instant(9000), weighed, now)).toBe(5000);
  });
});

describe("undo", () => {
  const sorting = { state: "closed" as const, doneBy: "a", recordedAt: instant(1_000_000) };

  it("is for whoever saved it, for ten minutes, once", () => {
    expect(undoUntil(1_000_000)).toBe(1_600_000);
    expect(judgeUndo(sorting, "a", instant(1_600_000))).toBe("fine");
    expect(judgeUndo(sorting, "a", instant(1_600_001))).toBe("undo-too-late");
    expect(judgeUndo(sorting, "b", instant(1_000_001))).toBe("undo-not-yours");
    expect(judgeUndo({ ...sorting, state: "undone" }, "a", instant(1_000_001))).toBe(
      "undone-already",
    );
  });
});
