/** A printed label seen from the front: symbol and text where the print page puts them, as grey pixels. */
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";
import { SHEETS, tagDrawing } from "@/lib/bags/rules/tag-sheet";
import { modulesOf } from "@/tests/support/drawn-tag";
import { GLYPHS } from "./glyphs";

/** 0 ink to 255 paper, in rows; `pxPerMm` pixels to a millimetre. */
export type Face = {
  width: number;
  height: number;
  pixels: Uint8Array;
  pxPerMm: number;
  /** Where the symbol is (without its quiet zone); null on a label without one. */
  symbol: { leftMm: number; topMm: number; sideMm: number; modules: number } | null;
};

const PX_PER_MM = 24;

function blank(widthMm: number, heightMm: number): Face {
  const [width, height] = [Math.round(widthMm * PX_PER_MM), Math.round(heightMm * PX_PER_MM)];
  const pixels = new Uint8Array(width * height).fill(255);
  return { width, height, pixels, pxPerMm: PX_PER_MM, symbol: null };
}

function box(face: Face, leftMm: number, topMm: number, widthMm: number, heightMm: number): void {
  const px = (mm: number) => Math.round(mm * face.pxPerMm);
  for (let row = px(topMm); row < px(topMm + heightMm); row += 1) {
    if (row < 0 || row >= face.height) continue;
    const start = row * face.width;
    face.pixels.fill(
      0,
      start + Math.max(0, px(leftMm)),
      start + Math.min(face.width, px(leftMm + widthMm)),
    );
  }
}

/** Capitals in a matrix of 5 by 7 dots, `sizeMm` from baseline to the capitals' top times 1.4. */
function write(face: Face, text: string, leftMm: number, baselineMm: number, sizeMm: number): void {
  const dot = (sizeMm * 0.72) / 7;
  Array.from(text.toUpperCase()).forEach((letter, at) => {
    const rows = GLYPHS[letter] ?? [];
    rows.forEach((bits, row) => {
      for (let column = 0; column < 5; column += 1) {
        if (!(bits & (16 >> column))) continue;
        const left = leftMm + (at * 6 + column) * dot;
        box(face, left, baselineMm - (7 - row) * dot, dot, dot);
      }
    });
  });
}

/** The tag of a bag as it comes out of the printer, on a label of the usual A4 sheet. */
export function tagFace(text: string, code: LabelCode | null): Face {
  const { label } = SHEETS["a4-21"];
  const face = blank(label.widthMm, label.heightMm);
  const { path, modules } = qrSymbol(text);
  const size = qrSize(modules);
  const drawing = tagDrawing(SHEETS["a4-21"], size);
  if (!drawing) throw new Error(`The symbol of ${text} does not fit on its label.`);
  const dark = modulesOf(path, modules);
  for (let at = 0; at < dark.length; at += 1) {
    if (!dark[at]) continue;
    const left = drawing.symbolLeftMm + (at % modules) * size.moduleMm;
    const top = drawing.symbolTopMm + Math.floor(at / modules) * size.moduleMm;
    box(face, left, top, size.moduleMm, size.moduleMm);
  }
  face.symbol = {
    leftMm: drawing.symbolLeftMm,
    topMm: drawing.symbolTopMm,
    sideMm: size.symbolMm,
    modules,
  };
  const shown = code === null ? "" : formatCode(code);
  for (const at of [0, 1] as const) {
    const line = at === 0 ? shown.slice(0, 5) : shown.slice(5);
    write(face, line, drawing.textLeftMm, drawing.codeBaselinesMm[at], drawing.codeSizeMm);
  }
  const words = code === null ? [] : ["Scan to see", "what this", "bag becomes"];
  words.forEach((line, at) => {
    const baseline = drawing.wordBaselinesMm[at] ?? 0;
    write(face, line, drawing.textLeftMm, baseline, drawing.wordSizeMm);
  });
  return face;
}

/** A label with words and a bar or a frame, and no symbol: what a camera sees between two tags. */
export function wordsFace(lines: readonly string[], stripes: readonly number[]): Face {
  const face = blank(70, 42.3);
  lines.forEach((line, at) => write(face, line, 5, 10 + at * 7, 6));
  let leftMm = 5;
  stripes.forEach((widthMm, at) => {
    if (at % 2 === 0) box(face, leftMm, 30, widthMm, 9);
    leftMm += widthMm;
  });
  // Three squares in the corners of one: what a finder pattern is made of, and not a symbol.
  for (const [left, top] of [
    [48, 4],
    [58, 4],
    [48, 14],
  ] as const) {
    box(face, left, top, 6, 6);
  }
  return face;
}
