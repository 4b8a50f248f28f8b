/**
 * Invariant: everything on a sheet has its place in millimetres from the paper's top left corner; no label
 * reaches over the paper or into another, and a tag is only drawn where symbol and text fit its label.
 */
import type { QrSize } from "./qr";

export const SHEET_IDS = ["a4-21", "letter-10", "letter-18"] as const;
export type SheetId = (typeof SHEET_IDS)[number];

export type SheetLayout = {
  id: SheetId;
  name: string;
  paper: { widthMm: number; heightMm: number };
  columns: number;
  rows: number;
  label: { widthMm: number; heightMm: number };
  /** Top left corner of the first label. */
  leftMm: number;
  topMm: number;
  /** From one label's corner to the next one's. */
  acrossMm: number;
  downMm: number;
};

const MM_PER_INCH = 25.4;

/** Two usual sheets of stickers, and a Letter page to cut; the A4 sheet has no gaps and can be cut too. */
export const SHEETS: Record<SheetId, SheetLayout> = {
  "a4-21": {
    id: "a4-21",
    name: "A4, 21 labels of 70 × 42.3 mm",
    paper: { widthMm: 210, heightMm: 297 },
    columns: 3,
    rows: 7,
    label: { widthMm: 70, heightMm: 42.3 },
    leftMm: 0,
    topMm: 0.45,
    acrossMm: 70,
    downMm: 42.3,
  },
  "letter-10": {
    id: "letter-10",
    name: "US Letter, 10 labels of 4 × 2 in",
    paper: { widthMm: 8.5 * MM_PER_INCH, heightMm: 11 * MM_PER_INCH },
    columns: 2,
    rows: 5,
    label: { widthMm: 4 * MM_PER_INCH, heightMm: 2 * MM_PER_INCH },
    leftMm: 0.15625 * MM_PER_INCH,
    topMm: 0.5 * MM_PER_INCH,
    acrossMm: 4.1875 * MM_PER_INCH,
    downMm: 2 * MM_PER_INCH,
  },
  "letter-18": {
    id: "letter-18",
    name: "US Letter, 18 tags to cut out",
    paper: { widthMm: 8.5 * MM_PER_INCH, heightMm: 11 * MM_PER_INCH },
    columns: 3,
    rows: 6,
    label: { widthMm: (8.5 * MM_PER_INCH) / 3, heightMm: (11 * MM_PER_INCH) / 6 },
    leftMm: 0,
    topMm: 0,
    acrossMm: (8.5 * MM_PER_INCH) / 3,
    downMm: (11 * MM_PER_INCH) / 6,
  },
};

export function labelsPerPage(sheet: SheetLayout): number {
  return sheet.columns * sheet.rows;
}

/** What a coordinator sets before printing. */
export type SheetSettings = {
  sheet: SheetId;
  /** The first free label on the first sheet, 1 at the top left, row by row. */
  start: number;
  /** How far this printer must move everything, in mm: to the right and down. */
  offsetXMm: number;
  offsetYMm: number;
  cutLines: boolean;
};

/** Farther off than this a printer is set up for other paper. */
export const MOST_OFFSET_MM = 10;

/** Reads settings from a query string; what is missing or cannot be right gets its default. */
export function readSheetSettings(query: Readonly<Record<string, unknown>>): SheetSettings {
  const sheet = SHEET_IDS.find((id) => id === query.sheet) ?? "a4-21";
  const start = Number(query.start ?? 1);
  const most = labelsPerPage(SHEETS[sheet]);
  return {
    sheet,
    start: Number.isInteger(start) && start >= 1 && start <= most ? start : 1,
    offsetXMm: readOffset(query.x) ?? 0,
    offsetYMm: readOffset(query.y) ?? 0,
    cutLines: query.lines === "1",
  };
}

/** Settings as typed or as in an address: `?sheet=a4-21&start=4&x=-0.5&y=1&lines=1`. */
export type TypedSettings = Partial<Record<"sheet" | "start" | "x" | "y" | "lines", string>>;

/** What of a query string are settings; a name that stands there twice counts as missing. */
export function typedSettings(query: Readonly<Record<string, unknown>>): TypedSettings {
  const typed: TypedSettings = {};
  for (const name of ["sheet", "start", "x", "y", "lines"] as const) {
    const value = query[name];
    if (typeof value === "string") typed[name] = value;
  }
  return typed;
}

/** An offset as typed: "-1.5", "0,8". null when it is no number of millimetres within ±10. */
export function readOffset(typed: unknown): number | null {
  if (typeof typed !== "string") return null;
  const plain = typed.trim().replace(",", ".").replace("\u2212", "-");
  if (!/^[-+]?\d{1,2}(\.\d{1,2})?$/.test(plain)) return null;
  const offset = Number(plain);
  return Math.abs(offset) <= MOST_OFFSET_MM ? offset : null;
}

export type LabelPlace = { leftMm: number; topMm: number };

/** Where label `number` (from 0, row by row) of a sheet is, before the printer's offset. */
export function labelPlace(sheet: SheetLayout, number: number): LabelPlace {
  const column = number % sheet.columns;
  const row = Math.floor(number / sheet.columns);
  return {
    leftMm: sheet.leftMm + column * sheet.acrossMm,
    topMm: sheet.topMm + row * sheet.downMm,
  };
}

/**
 * Deals tags out to sheets, the first one from its first free label on.
 *
 * @returns for each sheet its labels: which tag (from 0) and where
 */
export function sheetPages(
  sheet: SheetLayout,
  tags: number,
  start: number,
): (LabelPlace & { tag: number })[][] {
  const perPage = labelsPerPage(sheet);
  const pages: (LabelPlace & { tag: number })[][] = [];
  for (let tag = 0; tag < tags; tag += 1) {
    const place = start - 1 + tag;
    const page = Math.floor(place / perPage);
    (pages[page] ??= []).push({ tag, ...labelPlace(sheet, place % perPage) });
  }
  return pages;
}

export type TagDrawing = {
  /** Where the symbol's dark square begins, from the label's corner. */
  symbolLeftMm: number;
  symbolTopMm: number;
  textLeftMm: number;
  codeSizeMm: number;
  wordSizeMm: number;
  /** Baselines of the code's two lines and of the three lines of words. */
  codeBaselinesMm: readonly [number, number];
  wordBaselinesMm: readonly [number, number, number];
};

/** Printers leave about this much of the paper's edge blank. */
const EDGE_MM = 4.5;
/** Least room for the text beside the symbol. */
const LEAST_TEXT_MM = 21;
/** Widths of the longest lines in ems, measured in the fonts: "MWMW-" in mono, "Scan to see what". */
const CODE_EMS = 3.6;
const WORD_EMS = 7.7;

/** Places symbol and text in a label. null when the symbol is too large for it. */
export function tagDrawing(sheet: SheetLayout, qr: QrSize): TagDrawing | null {
  const { widthMm, heightMm } = sheet.label;
  if (qr.totalMm > heightMm) return null;
  // Wide labels keep more air to the left; on narrow ones the quiet zone alone keeps the edge.
  const spare = widthMm - qr.totalMm - LEAST_TEXT_MM - EDGE_MM;
  if (spare < 0) return null;
  const before = Math.min(spare / 3, 5);
  const textLeftMm = before + qr.totalMm;
  const textWidth = widthMm - textLeftMm - EDGE_MM;
  const codeSizeMm = Math.min(8, textWidth / CODE_EMS);
  const wordSizeMm = Math.min(3.6, textWidth / WORD_EMS);
  const codeLine = codeSizeMm * 1.08;
  const wordLine = wordSizeMm * 1.32;
  const gap = wordSizeMm * 0.75;
  // From the top of the capitals of the first line to the baseline of the last.
  const block = codeSizeMm * 0.72 + codeLine + gap + 3 * wordLine;
  const first = (heightMm - block) / 2 + codeSizeMm * 0.72;
  const words = first + codeLine + gap + wordLine;
  return {
    symbolLeftMm: before + qr.quietMm,
    symbolTopMm: (heightMm - qr.symbolMm) / 2,
    textLeftMm,
    codeSizeMm,
    wordSizeMm,
    codeBaselinesMm: [first, first + codeLine],
    wordBaselinesMm: [words, words + wordLine, words + 2 * wordLine],
  };
}

/** Letters that fit a line of words on the narrowest label. */
const LINE_LETTERS = 16;

/** A name in up to `most` lines of a label, broken between words; what is too long ends in an ellipsis. */
export function labelLines(name: string, most: number): string[] {
  const lines: string[] = [];
  let rest = name.trim();
  while (rest !== "" && lines.length < most) {
    const last = lines.length === most - 1;
    if (rest.length <= LINE_LETTERS) return [...lines, rest];
    if (last) return [...lines, `${rest.slice(0, LINE_LETTERS - 1).trimEnd()}\u2026`];
    const space = rest.lastIndexOf(" ", LINE_LETTERS);
    const cut = space > 0 ? space : LINE_LETTERS;
    lines.push(rest.slice(0, cut).trimEnd());
    rest = rest.slice(cut).trimStart();
  }
  return lines;
}
