/**
 * Scales against published values. Each fixture names its source in every row:
 * oiml_mpe.csv: OIML R 76-1:2006 Table 6 as read in UK SI 1995/1907 Schedule 2 paragraph 4 Table 3;
 * oiml_classes.csv: OIML R 76-1 Table 3 (secondary source); weighing_examples.csv: worked examples.
 */
import fs from "node:fs";
import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { readMass } from "@/lib/core/mass";
import { judgeCheck } from "@/lib/scales/rules/check";
import {
  checkScale,
  combinedTolerance,
  minimumCapacity,
  mpeInService,
  type ScaleSpec,
} from "@/lib/scales/rules/scale";

function table<Row>(name: string): Row[] {
  const text = fs.readFileSync(`fixtures/reference/${name}.csv`, "utf8");
  return Papa.parse<Row>(text, { header: true, skipEmptyLines: true }).data;
}

const verified = (
  scaleClass: "III" | "IIII",
  eMilligrams: number,
  intervals: number,
): ScaleSpec => ({
  class: scaleClass,
  maxMilligrams: eMilligrams * intervals,
  eMilligrams,
  dMilligrams: eMilligrams,
  statedAccuracyMilligrams: null,
});

const milligrams = (text: string): number => {
  const reading = readMass(text, "g");
  if (!reading.ok) throw new Error(`${text}: ${reading.problem}`);
  return reading.milligrams;
};

type MpeRow = {
  class: string;
  load_from_e: string;
  load_to_e_inclusive: string;
  mpe_initial_e: string;
  mpe_in_service_e: string;
  source: string;
};
const mpeRows = table<MpeRow>("oiml_mpe").filter(
  (row): row is MpeRow & { class: "III" | "IIII" } => row.class === "III" || row.class === "IIII",
);

describe("maximum permissible error in service (R 76-1 Table 6, doubled)", () => {
  it("compares three bands of each class", () => {
    expect(mpeRows.map((row) => row.class)).toEqual(["III", "III", "III", "IIII", "IIII", "IIII"]);
    expect(mpeRows.every((row) => row.source.includes("SI 1995/1907"))).toBe(true);
  });

  it.each(mpeRows)("class $class up to $load_to_e_inclusive e: ± $mpe_in_service_e e", (row) => {
    const e = 5_000;
    const scale = verified(row.class, e, row.class === "III" ? 10_000 : 1_000);
    const inService = Number(row.mpe_in_service_e) * e;
    expect(Number(row.mpe_in_service_e)).toBe(2 * Number(row.mpe_initial_e));
    expect(mpeInService(scale, Number(row.load_to_e_inclusive) * e)).toBe(inService);
    expect(mpeInService(scale, Number(row.load_from_e) * e + 1)).toBe(inService);
  });
});

describe("a check weight in service (R 76-1 Table 6, doubled)", () => {
  it.each(mpeRows)(
    "class $class at $load_to_e_inclusive e passes at ± $mpe_in_service_e e and not beyond",
    (row) => {
      const e = 5_000;
      const scale = verified(row.class, e, row.class === "III" ? 10_000 : 1_000);
      const mass = Number(row.load_to_e_inclusive) * e;
      const limit = Number(row.mpe_in_service_e) * e;
      for (const sign of [1, -1]) {
        expect(judgeCheck(scale, mass, mass + sign * limit)).toEqual({
          errorMilligrams: sign * limit,
          limitMilligrams: limit,
          passed: true,
        });
        expect(judgeCheck(scale, mass, mass + sign * (limit + 1)).passed).toBe(false);
      }
      // Just above a band's first load the limit is that band's, not the one below.
      const first = Number(row.load_from_e) * e + 1;
      expect(judgeCheck(scale, first, first + limit).passed).toBe(true);
    },
  );
});

type Example = { case: string; load: string; e_or_d: string; tolerance: string; source: string };
const examples = table<Example>("weighing_examples").filter(
  (row) => row.case.startsWith("OIML") && row.load !== "",
);

describe("worked examples (double in service)", () => {
  it("are there", () => {
    expect(examples).toHaveLength(14);
  });

  it.each(examples)("$case: ± 2 × $tolerance g", (row) => {
    const scaleClass = row.case.includes("IIII") ? "IIII" : "III";
    const scale = verified(
      scaleClass,
      milligrams(row.e_or_d),
      scaleClass === "III" ? 10_000 : 1_000,
    );
    expect(mpeInService(scale, milligrams(row.load))).toBe(2 * milligrams(row.tolerance));
  });

  it("5000 divisions of class III: ± 1.5 e at first, ± 3 e in service (METTLER TOLEDO Weigh Module Systems Handbook p. 3-15)", () => {
    const [row] = table<Example & { n: string }>("weighing_examples").filter((one) =>
      one.case.startsWith("OIML III initial, 5000"),
    );
    expect(row?.tolerance).toBe("1.5");
    expect(mpeInService(verified("III", 1_000, 10_000), 5_000 * 1_000)).toBe(2 * 1_500);
  });
});

type ClassRow = {
  class: string;
  e_from: string;
  e_to: string;
  n_min: string;
  n_max: string;
  min_capacity_e: string;
};
const classRows = table<ClassRow>("oiml_classes").filter(
  (row): row is ClassRow & { class: "III" | "IIII" } => row.class === "III" || row.class === "IIII",
);

describe("classes (R 76-1 Table 3, secondary source)", () => {
  it.each(classRows)(
    "class $class from e = $e_from: n $n_min to $n_max, Min $min_capacity_e e",
    (row) => {
      const e = milligrams(row.e_from);
      const [least, most] = [Number(row.n_min), Number(row.n_max)];
      expect(checkScale(verified(row.class, e, least))).toBeNull();
      expect(checkScale(verified(row.class, e, most))).toBeNull();
      expect(checkScale(verified(row.class, e, least - 1))).toMatchObject({
        code: "scale-intervals",
        least,
        most,
      });
      expect(checkScale(verified(row.class, e, most + 1))).toMatchObject({
        code: "scale-intervals",
        least,
        most,
      });
      expect(minimumCapacity(verified(row.class, e, most))).toBe(Number(row.min_capacity_e) * e);
      if (row.e_to !== "") {
        expect(checkScale(verified(row.class, milligrams(row.e_to), least))).toBeNull();
      }
    },
  );

  it("knows no finer e than the class has", () => {
    expect(checkScale(verified("III", 50, 1_000))).toMatchObject({ code: "scale-interval" });
    expect(checkScale(verified("IIII", 2_000, 500))).toMatchObject({ code: "scale-interval" });
  });
});

describe("combined tolerance (JCGM 100:2008 4.3.7: a rectangular distribution of half-width a has u = a/√3; 5.1.2: u adds in squares)", () => {
  it.each([
    // 2·√(Σ a²/3) worked by hand, rounded up to the next milligram
    { mpes: [15_000], by: "2 × 15000/√3 = 17320.508…", tolerance: 17_321 },
    { mpes: [5_000, 5_000, 5_000], by: "√3 × 5000 × 2/√3 = 10000 exactly", tolerance: 10_000 },
    { mpes: [3_000, 4_000], by: "2 × 5000/√3 = 5773.502…", tolerance: 5_774 },
    {
      mpes: [10_000, 10_000, 5_000, 5_000],
      by: "2 × √(250·10⁶/3) = 18257.418…",
      tolerance: 18_258,
    },
  ])("$by", ({ mpes, tolerance }) => {
    expect(combinedTolerance(mpes, 1)).toBe(tolerance);
  });
});
