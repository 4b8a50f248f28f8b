import { describe, expect, it } from "vitest";
import { day } from "@/lib/core/time";
import { balanceInputSchema } from "@/lib/reports/contract";
import {
  diversionOf,
  figuresOf,
  formatShare,
  imbalanceOf,
  NOTHING_MOVED,
  rejectShareOf,
  sumFigures,
} from "@/lib/reports/rules/balance";
import { binsOf, largestStacks } from "@/lib/reports/rules/chart";
import { csvHeaders, exportQuery } from "@/lib/reports/rules/csv-headers";
import { monthsBefore, periodTitle, readPeriod, shortcuts } from "@/lib/reports/rules/periods";
import { readReportQuery, reportValues } from "@/lib/reports/rules/report-query";
import { expandedGrams, gramsByBasis } from "@/lib/reports/rules/uncertainty";
import { monthOf } from "@/lib/core/time";

const period = (from: string, until: string) => ({ from: day(from), until: day(until) });

describe("a report's row", () => {
  // ledger.md, Worked example: row A blue, 2160 g sorted in, 27 g to the reject bin, loss 13, pieces 820.
  const blue = figuresOf(0, {
    ...NOTHING_MOVED,
    held: 1300,
    loss: 13,
    pieces: 820,
    accepted: 2160,
  });
  const unsorted = figuresOf(0, { ...NOTHING_MOVED, held: 0, collected: 2160 });
  const reject = figuresOf(0, { ...NOTHING_MOVED, held: 27 });

  it("has the worked example's figures", () => {
    expect(blue.resorted).toBe(2133);
    expect(blue.closing).toBe(1300);
    expect(unsorted.resorted).toBe(-2160);
    expect([blue, unsorted, reject].map(imbalanceOf)).toEqual([0, 0, 0]);
  });

  it("adds up: over all rows nothing was re-sorted", () => {
    const total = sumFigures([blue, unsorted, reject]);
    expect(total.resorted).toBe(0);
    expect(total.closing).toBe(1327);
    expect(imbalanceOf(total)).toBe(0);
  });

  it("keeps history from before the first day out of the shed", () => {
    const row = figuresOf(0, { ...NOTHING_MOVED, collected: 500, beforeOpening: 500 });
    expect([row.closing, row.resorted, imbalanceOf(row)]).toEqual([0, 0, 0]);
  });

  it("has rates from whole numbers", () => {
    const row = figuresOf(0, {
      ...NOTHING_MOVED,
      pieces: 904,
      disposed: 90,
      loss: 6,
      accepted: 90,
      rejected: 10,
    });
    expect(formatShare(diversionOf(row) ?? { part: 0, whole: 1 })).toBe("90.4 %");
    expect(rejectShareOf(row)).toEqual({ part: 10, whole: 100 });
    expect(diversionOf(figuresOf(5, NOTHING_MOVED))).toBeNull();
  });
});

describe("± 2 u", () => {
  const total = (
    scaleNumber: number,
    mpeMilligrams: number,
    basis: "checked" | "estimated" = "checked",
  ) => ({
    measure: "collected" as const,
    basis,
    scaleNumber,
    grams: 1000,
    mpeMilligrams,
  });

  it("adds the errors of one scale and combines scales by the root of the sum of squares", () => {
    // One scale, 30 g + 30 g: 2 × 60 / √3 = 69.28 g.
    expect(expandedGrams([total(1, 30_000), total(1, 30_000)])).toBe(70);
    // Two scales, 30 g each: 2 × √(2 × 30² / 3) = 48.99 g.
    expect(expandedGrams([total(1, 30_000), total(2, 30_000)])).toBe(49);
    expect(expandedGrams([])).toBe(0);
  });

  it("keeps kilograms by basis, the largest first", () => {
    expect(gramsByBasis([total(0, 0, "estimated"), total(1, 5), total(2, 5)])).toEqual([
      { basis: "checked", grams: 2000 },
      { basis: "estimated", grams: 1000 },
    ]);
  });
});

describe("periods", () => {
  it.each([
    ["2026-03-01", "2026-06-01", "March to May 2026"],
    ["2026-11-01", "2026-12-01", "November 2026"],
    ["2026-01-01", "2027-01-01", "2026"],
    ["2025-12-01", "2026-03-01", "December 2025 to February 2026"],
    ["2026-03-03", "2026-05-21", "3 March to 20 May 2026"],
    ["2026-03-03", "2026-03-04", "3 March 2026"],
  ])("%s to %s is %s", (from, until, title) => {
    expect(periodTitle(period(from, until))).toBe(title);
  });

  it("offers month, quarter and year around a day", () => {
    expect(
      shortcuts(day("2026-02-14")).map(({ name, period: of }) => [name, of.from, of.until]),
    ).toEqual([
      ["This month", "2026-02-01", "2026-03-01"],
      ["Last month", "2026-01-01", "2026-02-01"],
      ["This quarter", "2026-01-01", "2026-04-01"],
      ["Last quarter", "2025-10-01", "2026-01-01"],
      ["This year", "2026-01-01", "2027-01-01"],
      ["Last year", "2025-01-01", "2026-01-01"],
    ]);
    expect(monthsBefore(monthOf(day("2026-01-01")), -1)).toBe("2026-02");
  });

  it("reads first and last day, or nothing", () => {
    expect(readPeriod("2026-03-01", "2026-05-31")).toEqual(period("2026-03-01", "2026-06-01"));
    expect(readPeriod("2026-03-02", "2026-03-01")).toBeNull();
    expect(readPeriod("2026-02-30", "2026-03-01")).toBeNull();
    expect(readPeriod(undefined, "2026-03-01")).toBeNull();
  });
});

describe("a report's address", () => {
  it("is read as it is written", () => {
    const of = period("2026-03-01", "2026-06-01");
    const read = readReportQuery(reportValues(of, ["month", "colour"], 3));
    expect(read).toEqual({ period: of, wrongDays: false, by: ["month", "colour"], page: 3 });
    expect(readReportQuery({ by: ["kind", "point"] }).by).toEqual(["point", "kind"]);
    expect(readReportQuery({ from: "x", page: "-1" })).toEqual({
      period: null,
      wrongDays: true,
      by: [],
      page: 1,
    });
  });

  it("of an export refuses days that make no period", () => {
    const read = (input: object) => balanceInputSchema.safeParse(input).success;
    expect(read({ from: "2026-03-01", until: "2026-03-02", by: "point" })).toBe(true);
    expect(read({ from: "2026-03-01", until: "2026-03-01" })).toBe(false);
    expect(read({ from: "2026-03-01", until: "2096-03-01" })).toBe(false);
    expect(read({ from: "2026-03-01", until: "2026-04-01", by: "shoe-size" })).toBe(false);
  });

  it("names the file and its description", () => {
    const of = period("2026-03-01", "2026-06-01");
    expect(exportQuery(of, [])).toBe("?from=2026-03-01&until=2026-06-01");
    expect(csvHeaders("balance", { ...of, by: ["point"] })).toMatchObject({
      "content-disposition": 'attachment; filename="bismar-balance-2026-03-01-2026-05-31.csv"',
      link: '<balance.csv-metadata.json?from=2026-03-01&until=2026-06-01&by=point>; rel="describedby"; type="application/csvm+json"',
      "x-accel-buffering": "no",
    });
    expect(csvHeaders("movements", of).link).toBeUndefined();
  });
});

describe("the chart", () => {
  it("counts by week up to a quarter, by month beyond", () => {
    const quarter = binsOf(period("2026-03-01", "2026-06-01"));
    expect([quarter.unit, quarter.bins.length]).toEqual(["week", 14]);
    expect(quarter.bins.at(-1)).toEqual(period("2026-05-31", "2026-06-01"));
    const half = binsOf(period("2026-03-15", "2026-09-10"));
    expect([half.unit, half.bins.length]).toEqual(["month", 7]);
    expect(half.bins[0]).toEqual(period("2026-03-15", "2026-04-01"));
  });

  it("keeps the largest and adds the others up", () => {
    const stacks = [3, 9, 1, 2].map((height, at) => ({ key: `p${at}`, heights: [height, 0] }));
    expect(largestStacks(stacks, 3, "rest").map(({ key, heights }) => [key, heights[0]])).toEqual([
      ["p1", 9],
      ["p0", 3],
      ["rest", 3],
    ]);
  });
});
