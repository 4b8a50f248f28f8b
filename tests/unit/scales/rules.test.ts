import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  checkReading,
  checkScale,
  combinedTolerance,
  minimumCapacity,
  mpeInService,
  type ScaleSpec,
} from "@/lib/scales/rules/scale";

const KG = 1_000_000;
const G = 1_000;

const bench: ScaleSpec = {
  class: "III",
  maxMilligrams: 30 * KG,
  eMilligrams: 10 * G,
  dMilligrams: 10 * G,
  statedAccuracyMilligrams: null,
};
const hanging: ScaleSpec = {
  class: "none",
  maxMilligrams: 50 * KG,
  eMilligrams: null,
  dMilligrams: 50 * G,
  statedAccuracyMilligrams: 100 * G,
};

describe("mpeInService", () => {
  it("steps up just above the end of a band", () => {
    expect(mpeInService(bench, 0)).toBe(10 * G);
    expect(mpeInService(bench, 5 * KG)).toBe(10 * G);
    expect(mpeInService(bench, 5 * KG + 1)).toBe(20 * G);
    expect(mpeInService(bench, 30 * KG)).toBe(30 * G);
  });

  it("is what the maker states for a scale that is not verified", () => {
    expect(mpeInService(hanging, 1)).toBe(100 * G);
    expect(mpeInService(hanging, 50 * KG)).toBe(100 * G);
  });

  it("is a whole number of milligrams and never falls with the load", () => {
    fc.assert(
      fc.property(
        fc.constantFrom(100, 200, 500, 1_000, 2_000, 5_000, 10_000),
        fc.nat(10_000),
        fc.nat(10_000),
        (e, a, b) => {
          const scale = { ...bench, eMilligrams: e, dMilligrams: e, maxMilligrams: e * 10_000 };
          const [small, large] = a < b ? [a, b] : [b, a];
          const low = mpeInService(scale, small * e);
          const high = mpeInService(scale, large * e);
          return Number.isInteger(low) && Number.isInteger(high) && low <= high;
        },
      ),
    );
  });
});

describe("checkReading", () => {
  it.each([
    [30 * KG, "fine"],
    [30 * KG + 10 * G, "above-max"],
    [30 * KG + 1, "above-max"],
    [2 * KG + 5 * G, "not-a-step"],
    [200 * G, "fine"],
    [190 * G, "below-minimum"],
    [0, "below-minimum"],
  ])("%i mg on a 30 kg, 10 g scale: %s", (reading, verdict) => {
    expect(checkReading(bench, reading)).toBe(verdict);
  });

  it("knows no minimum for a scale that is not verified", () => {
    expect(minimumCapacity(hanging)).toBe(0);
    expect(checkReading(hanging, 50 * G)).toBe("fine");
  });
});

describe("combinedTolerance", () => {
  it("is not less than one display step", () => {
    expect(combinedTolerance([], 10 * G)).toBe(10 * G);
    expect(combinedTolerance([1 * G], 10 * G)).toBe(10 * G);
  });

  it("is exact: the smallest whole t with 3 t² ≥ 4 Σ mpe², also past what a float can square", () => {
    fc.assert(
      fc.property(fc.array(fc.nat(10 ** 9), { minLength: 1, maxLength: 40 }), (mpes) => {
        const t = BigInt(combinedTolerance(mpes, 0));
        const wanted = 4n * mpes.reduce((sum, mpe) => sum + BigInt(mpe) ** 2n, 0n);
        return 3n * t * t >= wanted && (t === 0n || 3n * (t - 1n) * (t - 1n) < wanted);
      }),
    );
  });
});

describe("checkScale", () => {
  it.each([
    ["a bench scale", bench, null],
    ["a hanging scale", hanging, null],
    ["d of 3 g", { ...hanging, dMilligrams: 3 * G }, "scale-step"],
    ["d of 25 g", { ...hanging, dMilligrams: 25 * G }, "scale-step"],
    [
      "Max that is no whole number of d",
      { ...hanging, maxMilligrams: 50 * KG + 10 * G },
      "scale-max",
    ],
    ["Max under d", { ...hanging, maxMilligrams: 0 }, "scale-max"],
    ["e finer than d", { ...bench, dMilligrams: 20 * G }, "scale-interval"],
    ["e over ten d", { ...bench, dMilligrams: 500, eMilligrams: 10 * G }, "scale-interval"],
    [
      "too few intervals",
      { ...bench, eMilligrams: 100 * G, dMilligrams: 100 * G },
      "scale-intervals",
    ],
    ["too many intervals", { ...bench, eMilligrams: 2 * G, dMilligrams: 2 * G }, "scale-intervals"],
    [
      "class IIII with 300 intervals",
      { ...bench, class: "IIII" as const, eMilligrams: 100 * G, dMilligrams: 100 * G },
      null,
    ],
  ])("%s", (_, scale, code) => {
    expect(checkScale(scale)?.code ?? null).toBe(code);
  });
});
