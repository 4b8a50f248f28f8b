/**
 * The individuals chart against the worked example of the NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.2
 * (flow rates of ten batches).
 */
import { describe, expect, it } from "vitest";
import { individualsChart } from "@/lib/core/individuals-chart";
import { referenceTable } from "../support/reference-table";

const rows = referenceTable("imr_example");
const batches = rows.filter((row) => /^\d+$/.test(row.batch ?? ""));
const cell = (batch: string, column: "x" | "moving_range"): number => {
  const row = rows.find((one) => one.batch?.startsWith(batch));
  if (!row?.[column]) throw new Error(`no ${column} in ${batch}`);
  return Number(row[column]);
};

describe("individuals and moving ranges (NIST/SEMATECH e-Handbook 6.3.2.2)", () => {
  it("has the ten batches and their nine ranges", () => {
    expect(batches).toHaveLength(10);
    batches.slice(1).forEach((row, at) => {
      const step = Math.abs(Number(row.x) - Number(batches[at]?.x));
      expect(step).toBeCloseTo(Number(row.moving_range), 10);
    });
  });

  it("finds the mean, the mean range and the limits to the printed figure", () => {
    const chart = individualsChart(batches.map((row) => Number(row.x)));
    if (!chart) throw new Error("no chart");
    expect(chart.mean).toBeCloseTo(cell("mean", "x"), 2);
    expect(chart.meanRange).toBeCloseTo(cell("mean", "moving_range"), 4);
    expect(chart.upper).toBeCloseTo(cell("UCL_x", "x"), 4);
    expect(chart.lower).toBeCloseTo(cell("LCL_x", "x"), 4);
    // Printed with an unrounded constant: 3.267 is given to four figures.
    expect(chart.rangeUpper).toBeCloseTo(cell("UCL_MR", "moving_range"), 3);
  });

  it("is mean ± 2.66 mean ranges, the factor as it is usually printed", () => {
    const chart = individualsChart([10, 12, 11]);
    expect(chart).toMatchObject({ mean: 11, meanRange: 1.5 });
    expect(((chart?.upper ?? 0) - 11) / 1.5).toBeCloseTo(2.66, 2);
    expect(11 - (chart?.lower ?? 0)).toBeCloseTo((chart?.upper ?? 0) - 11, 10);
  });

  it("has no range of one figure", () => {
    expect(individualsChart([])).toBeNull();
    expect(individualsChart([5])).toBeNull();
    expect(individualsChart([5, 5])).toMatchObject({ lower: 5, upper: 5, meanRange: 0 });
  });
});
