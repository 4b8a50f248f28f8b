import { describe, expect, test } from "vitest";
import { decimalPadding } from "@/components/ui/decimal-align";

describe("figures of a column meet on the decimal point", () => {
  test("shorter fractions are filled up, whole numbers get the point too", () => {
    expect(decimalPadding(["2.16", "11", "0.875"])).toEqual(["0", ".000", ""]);
  });

  test("whole numbers alone need nothing", () => {
    expect(decimalPadding(["3", "120"])).toEqual(["", ""]);
  });

  test("a cell without a figure gets nothing and changes nothing", () => {
    expect(decimalPadding([null, "1.5", "2"])).toEqual(["", "", ".0"]);
  });

  test("signs and thousands are no decimals", () => {
    expect(decimalPadding(["\u2212 1\u2009231.044", "+ 0.25"])).toEqual(["", "0"]);
  });

  test("every filled figure is equally long behind its point", () => {
    const figures = ["1", "1.2", "1.23", "1.234", "12.3"];
    const filled = figures.map((figure, at) => figure + (decimalPadding(figures)[at] ?? ""));
    expect(new Set(filled.map((figure) => figure.length - figure.indexOf("."))).size).toBe(1);
  });
});
