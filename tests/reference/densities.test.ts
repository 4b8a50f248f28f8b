/**
 * What floats and what sinks in water.
 *
 * Sources (column of fixtures/reference/densities.csv): ACS Omega 2022, 7(16) 13403, Table 1; matmake.com; 24kjx.com.cn;
 * diamondmold.com; omnexus.specialchem.com; greensutra.in; perpetualplasticproject.com, which also says of each of its
 * plastics whether it floats. They are handbooks of the web and no limits of a standard.
 */
import { describe, expect, it } from "vitest";
import type { Polymer } from "@/lib/core/plastics";
import { DENSITIES, floats, WATER } from "@/lib/stock/rules/float-or-sink";
import { referenceTable } from "../support/reference-table";

/** Which names of the table are which stored polymer. */
const NAMES: Partial<Record<Polymer, readonly string[]>> = {
  PP: ["PP", "PP homopolymer", "PP copolymer"],
  "PE-LD": ["LDPE"],
  "PE-HD": ["HDPE"],
  PS: ["PS", "GPPS", "HIPS"],
  ABS: ["ABS"],
  PA: ["PA6", "PA66"],
  PC: ["PC"],
  PLA: ["PLA"],
  PET: ["PET"],
  PVC: ["PVC (rigid)", "PVC-U", "PVC-P"],
};

const rows = referenceTable("densities");
const of = (polymer: Polymer) => rows.filter((row) => NAMES[polymer]?.includes(row.polymer ?? ""));

describe("densities", () => {
  it("have a row for every polymer that the table of the guide names, and no other", () => {
    expect(DENSITIES.map(({ polymer }) => polymer).sort()).toEqual(Object.keys(NAMES).sort());
  });

  it.each(DENSITIES)("of $polymer are the widest range that the sources give", (row) => {
    const published = of(row.polymer);
    expect(published.length).toBeGreaterThan(0);
    expect(row.least).toBe(Math.min(...published.map((one) => Number(one.g_per_cm3_min))));
    expect(row.most).toBe(Math.max(...published.map((one) => Number(one.g_per_cm3_max))));
  });

  it("say float or sink as the workshop guide of 2014 does, and never both for one plastic", () => {
    const water = Number(rows.find((row) => row.polymer === "water")?.g_per_cm3_min);
    expect(water).toBe(WATER);
    expect(DENSITIES.filter(floats).map(({ polymer }) => polymer)).toEqual([
      "PP",
      "PE-LD",
      "PE-HD",
    ]);
    for (const row of DENSITIES) {
      expect(row.most < water || row.least > water).toBe(true);
    }
  });
});
