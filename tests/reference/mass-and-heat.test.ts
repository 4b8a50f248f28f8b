/**
 * Mass = volume × density, the densities that plans compute with, and the temperatures that are never exceeded.
 *
 * Sources: worked examples of tutoringspots.com ("how do you calculate mass using density and volume"),
 * thirdspacelearning.com (GCSE maths worksheet "density") and sciencing.com ("calculate mass, density"), rows of
 * fixtures/reference/mass_examples.csv; the handbook pages of fixtures/reference/densities.csv; barrel and melt
 * temperatures of bebonestool.com and plastic-industry.com, rows of fixtures/reference/processing.csv. None is a standard.
 */
import { describe, expect, it } from "vitest";
import { massOf, sheetVolume } from "@/lib/production/rules/feedstock";
import { REFERENCE } from "@/lib/production/rules/reference";
import { HEATABLE, type Heatable } from "@/lib/production/terms";
import { referenceTable } from "../support/reference-table";

/** Which names of the tables are which stored polymer. */
const NAMES: Record<Heatable, readonly string[]> = {
  PP: ["PP", "PP homopolymer", "PP copolymer"],
  "PE-LD": ["LDPE"],
  "PE-HD": ["HDPE"],
  PS: ["PS", "GPPS", "HIPS"],
  ABS: ["ABS"],
  PA: ["PA6", "PA66"],
  PC: ["PC"],
  PLA: ["PLA"],
  PET: ["PET"],
};

describe("mass = volume × density", () => {
  const examples = referenceTable("mass_examples").filter(
    (row) => row.volume_cm3 && !row.what?.startsWith("NEGATIVE"),
  );

  it("has five examples in grams", () => {
    expect(examples).toHaveLength(5);
  });

  it.each(examples)("$what: $mass_g g", (row) => {
    const mass = massOf(Number(row.volume_cm3) * 1000, Number(row.density_g_cm3) * 1000);
    expect(mass).toBe(Number(row.mass_g) * 1000);
  });

  it("4 × 6 × 2 in of copper at 0.324 lb/in³ are 15.552 lb (inch and pound by their definitions)", () => {
    const [row] = referenceTable("mass_examples").filter((one) => one.what?.startsWith("copper"));
    expect(row?.what).toContain("4x6x2 in = 48 in3 at 0.324 lb/in3 -> 15.552 lb");
    const inch = 25_400;
    const volume = sheetVolume({ lengthUm: 4 * inch, widthUm: 6 * inch, thicknessUm: 2 * inch });
    const mgPerPound = 453_592.37;
    const density = (0.324 * mgPerPound) / (inch / 10_000) ** 3;
    expect(massOf(volume, density) / mgPerPound).toBeCloseTo(15.552, 5);
  });

  it("of the sheets that were worked out holds for their sizes in millimetres", () => {
    const sheet = (lengthUm: number, widthUm: number, thicknessUm: number) =>
      sheetVolume({ lengthUm, widthUm, thicknessUm });
    const mass = (what: string) =>
      Number(examples.find((row) => row.what?.includes(what))?.mass_g) * 1000;
    expect(massOf(sheet(1_000_000, 1_000_000, 10_000), REFERENCE["PE-HD"].mgPerCm3)).toBe(
      mass("1000x1000x10 mm"),
    );
    expect(massOf(sheet(500_000, 500_000, 12_000), REFERENCE.PP.mgPerCm3)).toBe(
      mass("500x500x12 mm"),
    );
  });
});

describe("the density that a plan computes with", () => {
  const rows = referenceTable("densities");

  it.each(HEATABLE)(
    "of %s lies inside what the handbooks print, and says their range",
    (polymer) => {
      const of = rows.filter((row) => NAMES[polymer].includes(row.polymer ?? ""));
      expect(of.length).toBeGreaterThan(0);
      const least = Math.min(...of.map((row) => Number(row.g_per_cm3_min)));
      const most = Math.max(...of.map((row) => Number(row.g_per_cm3_max)));
      const { mgPerCm3, source } = REFERENCE[polymer];
      expect(mgPerCm3 / 1000).toBeGreaterThanOrEqual(least);
      expect(mgPerCm3 / 1000).toBeLessThanOrEqual(most);
      const range = source.match(/\d\.\d+/g)?.map(Number);
      expect([range?.[0], range?.at(-1)]).toEqual([least, most]);
    },
  );

  it.each(HEATABLE)("of %s is above that of its melt", (polymer) => {
    expect(REFERENCE[polymer].meltMgPerCm3).toBeLessThan(REFERENCE[polymer].mgPerCm3);
  });
});

describe("the temperature that is never exceeded", () => {
  const rows = referenceTable("processing").filter((row) => row.melt_C_max);

  // bebonestool.com, "common plastic specific gravity and shrinkage"; plastic-industry.com, "processing guidelines".
  it.each([
    ["PE-HD", ["HDPE", "PE (all)"]],
    ["PE-LD", ["LDPE", "PE (all)"]],
    ["PP", ["PP", "PP homopolymer", "PP copolymer"]],
    ["PS", ["GPPS", "HIPS"]],
    ["ABS", ["ABS"]],
    ["PET", ["PET"]],
    ["PC", ["PC"]],
    ["PA", ["Nylon 6"]],
  ] as const)("of %s is the lowest that any page prints as its highest", (polymer, names) => {
    const highest = rows
      .filter((row) => (names as readonly string[]).includes(row.polymer ?? ""))
      .map((row) => Number(row.melt_C_max));
    expect(highest.length).toBeGreaterThan(0);
    expect(REFERENCE[polymer].ceilingCelsius).toBe(Math.min(...highest));
  });

  it("of PLA has no source here and is the lowest of all", () => {
    expect(rows.some((row) => row.polymer === "PLA")).toBe(false);
    expect(Math.min(...HEATABLE.map((polymer) => REFERENCE[polymer].ceilingCelsius))).toBe(
      REFERENCE.PLA.ceilingCelsius,
    );
  });
});
