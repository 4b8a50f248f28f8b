import { describe, expect, it } from "vitest";
import { lossOf, shareWords } from "@/lib/stock/rules/own-loss";
import { judgeStep, outputKind, shapeOf, type StepMaterial } from "@/lib/stock/rules/steps";

const lids: StepMaterial = {
  polymer: "PE-HD",
  kind: "lids",
  colourCode: "blue",
  form: "whole",
  wash: "as-received",
};
const bottles: StepMaterial = { ...lids, kind: "bottles", colourCode: "white" };

describe("what comes out of a step", () => {
  it("washing keeps the form and makes damp, drying makes dry, shredding makes flake", () => {
    expect(shapeOf("washing", [lids])).toMatchObject({ form: "whole", wash: "washed", damp: true });
    expect(shapeOf("drying", [{ ...lids, wash: "washed" }])).toMatchObject({
      form: "whole",
      wash: "dry",
      damp: true,
    });
    expect(shapeOf("shredding", [lids])).toMatchObject({
      form: "flake",
      wash: "as-received",
      damp: false,
    });
    expect(shapeOf("drying", [lids])).toMatchObject({ wash: "dry", damp: false });
  });

  it("shredding joins forms, and is no cleaner or drier than its worst part", () => {
    const sheet: StepMaterial = { ...lids, form: "sheet", wash: "dry" };
    expect(shapeOf("shredding", [lids, sheet])).toMatchObject({
      form: "flake",
      wash: "as-received",
    });
    expect(shapeOf("shredding", [sheet, { ...lids, wash: "washed" }])).toMatchObject({
      wash: "washed",
      damp: true,
    });
    expect(shapeOf("shredding", [sheet])).toMatchObject({ wash: "dry" });
  });

  it("is of one polymer, and of one form where the form stays", () => {
    expect(shapeOf("shredding", [lids, { ...lids, polymer: "PP" }]).kind).toBe("polymers-differ");
    expect(shapeOf("washing", [lids, { ...lids, form: "flake" }]).kind).toBe("forms-differ");
    expect(shapeOf("drying", []).kind).toBe("polymers-differ");
  });

  it("has the kind and colour that went in where there is one, else they must be said", () => {
    const unsaid = { kind: null, colourCode: null };
    expect(outputKind(unsaid, [lids, lids])).toEqual({ kind: "lids", colourCode: "blue" });
    expect(outputKind(unsaid, [lids, bottles])).toEqual({ kind: null, colourCode: null });
    expect(outputKind({ kind: "other", colourCode: "mixed" }, [lids, bottles])).toEqual({
      kind: "other",
      colourCode: "mixed",
    });
  });
});

describe("judging a step", () => {
  const sums = { inputGrams: 3160, outputGrams: 3151, lossGrams: 0, damp: false };
  const no = { cause: null, confirmed: false };

  it("the ledger's worked example: 3160 to 3151 and 9 g of dust", () => {
    const judged = { ...sums, lossGrams: 9, toleranceMilligrams: 5000 };
    expect(judgeStep(judged, no)).toEqual({ kind: "within", differenceGrams: 0 });
    const unnamed = { ...sums, toleranceMilligrams: 5000 };
    expect(judgeStep(unnamed, no)).toEqual({ kind: "needs-cause", differenceGrams: 9 });
    expect(judgeStep(unnamed, { cause: "dust", confirmed: false })).toEqual({
      kind: "loss",
      differenceGrams: 9,
      cause: "dust",
    });
  });

  it("the scale's own doubt comes before a cause", () => {
    const judged = { ...sums, toleranceMilligrams: 9000 };
    expect(judgeStep(judged, { cause: "dust", confirmed: false })).toEqual({
      kind: "within",
      differenceGrams: 9,
    });
  });

  it("more out than in is asked about, and no cause explains it", () => {
    const judged = { ...sums, outputGrams: 3300, toleranceMilligrams: 5000 };
    expect(judgeStep(judged, { cause: "dust", confirmed: false }).kind).toBe("needs-check");
    expect(judgeStep(judged, { cause: null, confirmed: true })).toEqual({
      kind: "gain",
      differenceGrams: -140,
    });
  });

  it("water explains a gain of up to half of what went in, and a slip of the comma is asked about", () => {
    const damp = { ...sums, damp: true, toleranceMilligrams: 5000 };
    expect(judgeStep({ ...damp, outputGrams: 3160 + 1580 }, no).kind).toBe("gain");
    expect(judgeStep({ ...damp, outputGrams: 3160 + 1581 }, no).kind).toBe("needs-check");
    expect(judgeStep({ ...damp, outputGrams: 31510 }, no).kind).toBe("needs-check");
  });
});

describe("the scheme's own loss", () => {
  it("is mean and sample standard deviation of the shares that did not come out", () => {
    // 1 %, 2 %, 3 %: mean 2 %, deviations −1, 0, 1, so s = √(2 / 2) = 1 %.
    const { count, mean, spread } = lossOf([
      { inputGrams: 1000, outputGrams: 990 },
      { inputGrams: 2000, outputGrams: 1960 },
      { inputGrams: 100, outputGrams: 97 },
    ]);
    expect(count).toBe(3);
    expect(mean).toBeCloseTo(0.02, 12);
    expect(spread).toBeCloseTo(0.01, 12);
  });

  it("has no mean without a step and no spread with one", () => {
    expect(lossOf([])).toEqual({ count: 0, mean: null, spread: null });
    expect(lossOf([{ inputGrams: 100, outputGrams: 110 }])).toEqual({
      count: 1,
      mean: -0.1,
      spread: null,
    });
  });

  it("reads as percent, a gain by its name", () => {
    expect(shareWords(0.0142)).toBe("1.4\u00a0%");
    expect(shareWords(-0.08)).toBe("gains 8.0\u00a0%");
    expect(shareWords(-0.0001)).toBe("0.0\u00a0%");
  });
});
