import { describe, expect, it } from "vitest";
import { qrSize } from "@/lib/bags/rules/qr";
import {
  labelLines,
  labelPlace,
  labelsPerPage,
  readOffset,
  readSheetSettings,
  SHEET_IDS,
  SHEETS,
  sheetPages,
  tagDrawing,
  typedSettings,
} from "@/lib/bags/rules/tag-sheet";

describe.each(SHEET_IDS.map((id) => SHEETS[id]))("$name", (sheet) => {
  it("keeps every label on the paper and out of the others", () => {
    for (let number = 0; number < labelsPerPage(sheet); number += 1) {
      const { leftMm, topMm } = labelPlace(sheet, number);
      expect(leftMm).toBeGreaterThanOrEqual(0);
      expect(topMm).toBeGreaterThanOrEqual(0);
      expect(leftMm + sheet.label.widthMm).toBeLessThanOrEqual(sheet.paper.widthMm + 1e-6);
      expect(topMm + sheet.label.heightMm).toBeLessThanOrEqual(sheet.paper.heightMm + 1e-6);
    }
    expect(sheet.acrossMm).toBeGreaterThanOrEqual(sheet.label.widthMm);
    expect(sheet.downMm).toBeGreaterThanOrEqual(sheet.label.heightMm);
  });

  it.each([2, 3, 4, 5])(
    "has room for a symbol of version %i with its quiet zone, and text",
    (version) => {
      const qr = qrSize(17 + 4 * version);
      const drawing = tagDrawing(sheet, qr);
      expect(drawing).not.toBeNull();
      if (!drawing) return;
      expect(drawing.symbolLeftMm).toBeGreaterThanOrEqual(qr.quietMm - 1e-9);
      expect(drawing.symbolTopMm).toBeGreaterThanOrEqual(qr.quietMm - 1e-9);
      expect(drawing.textLeftMm).toBeGreaterThanOrEqual(
        drawing.symbolLeftMm + qr.symbolMm + qr.quietMm - 1e-9,
      );
      expect(drawing.codeBaselinesMm[0] - drawing.codeSizeMm).toBeGreaterThan(0);
      expect(drawing.wordBaselinesMm[2] + drawing.wordSizeMm * 0.3).toBeLessThan(
        sheet.label.heightMm,
      );
    },
  );
});

describe("tagDrawing", () => {
  it("refuses a symbol that is higher than the label", () => {
    expect(tagDrawing(SHEETS["a4-21"], qrSize(57))).toBeNull();
    expect(tagDrawing(SHEETS["letter-10"], qrSize(49))).not.toBeNull();
  });
});

describe("sheetPages", () => {
  const a4 = SHEETS["a4-21"];

  it.each([
    // tags, first free label, labels on each sheet
    [21, 1, [21]],
    [22, 1, [21, 1]],
    [1, 21, [1]],
    [2, 21, [1, 1]],
    [500, 1, [...Array<number>(23).fill(21), 17]],
    [20, 3, [19, 1]],
  ])("%i tags from label %i on", (tags, start, expected) => {
    const pages = sheetPages(a4, tags, start);
    expect(pages.map((page) => page.length)).toEqual(expected);
    expect(pages.flat().map((label) => label.tag)).toEqual([...Array(tags).keys()]);
  });

  it("begins at the first free label and goes row by row", () => {
    const [first] = sheetPages(a4, 3, 3);
    expect(first?.[0]).toMatchObject({ tag: 0, leftMm: 140 });
    expect(first?.[1]).toMatchObject({ tag: 1, leftMm: 0 });
    expect(first?.[1]?.topMm).toBeCloseTo(42.75, 6);
  });
});

describe("labelLines", () => {
  it.each([
    ["Blue crate 1", ["Blue crate 1"]],
    ["Large blue crate by the door", ["Large blue crate", "by the door"]],
    ["Large blue crate by the second door", ["Large blue crate", "by the second d…"]],
    ["Antidisestablishmentarianism", ["Antidisestablish", "mentarianism"]],
  ])("%s", (name, lines) => {
    expect(labelLines(name, 2)).toEqual(lines);
  });
});

describe("readSheetSettings", () => {
  it("takes what can be right and gives the rest its default", () => {
    expect(
      readSheetSettings({ sheet: "letter-10", start: "10", x: "-1,5", y: "0.8", lines: "1" }),
    ).toEqual({
      sheet: "letter-10",
      start: 10,
      offsetXMm: -1.5,
      offsetYMm: 0.8,
      cutLines: true,
    });
    expect(readSheetSettings({ sheet: "a5", start: "22", x: "11", y: "two" })).toEqual({
      sheet: "a4-21",
      start: 1,
      offsetXMm: 0,
      offsetYMm: 0,
      cutLines: false,
    });
  });

  it("takes from an address what stands there once", () => {
    expect(typedSettings({ sheet: "a4-21", start: ["1", "2"], x: "1", other: "?" })).toEqual({
      sheet: "a4-21",
      x: "1",
    });
  });

  it("reads offsets with comma, point and a real minus sign", () => {
    expect(readOffset("\u22121,25")).toBe(-1.25);
    expect(readOffset("10")).toBe(10);
    expect(readOffset("10.1")).toBeNull();
    expect(readOffset("")).toBeNull();
    expect(readOffset("1e1")).toBeNull();
  });
});
