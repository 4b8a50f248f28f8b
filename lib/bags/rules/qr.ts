/**
 * Invariant: a tag's QR symbol stands in alphanumeric mode at error correction level Q, its module is at
 * least 0.8 mm, the symbol (without its quiet zone) at least 30 mm, the quiet zone 4 modules (ISO/IEC 18004).
 */
import QRCode from "qrcode";

export const LEAST_SYMBOL_MM = 30;
export const LEAST_MODULE_MM = 0.8;
export const QUIET_MODULES = 4;

export type QrSymbol = {
  /** 1 to 40; the symbol has 17 + 4 × version modules a side. */
  version: number;
  modules: number;
  /** Outline of the dark modules in module units, from 0,0 at the symbol's corner; fill rule evenodd. */
  path: string;
  /** False when a character of the address (such as "_" or "[") pushed it into byte mode. */
  alphanumeric: boolean;
};

const ALPHANUMERIC = /^[0-9A-Z $%*+\-./:]+$/;

/**
 * Makes the symbol of a text at error correction level Q. An address in capitals is one alphanumeric segment
 * throughout, never split where figures follow each other, so that the tags of an order are all of one size.
 */
export function qrSymbol(text: string): QrSymbol {
  const content = ALPHANUMERIC.test(text) ? [{ data: text, mode: "alphanumeric" as const }] : text;
  const made = QRCode.create(content, { errorCorrectionLevel: "Q" });
  const { size, data } = made.modules;
  return {
    version: made.version,
    modules: size,
    path: outline((column, row) => data[row * size + column] === 1, size),
    alphanumeric: made.segments.every((segment) => segment.mode.id === "Alphanumeric"),
  };
}

export type QrSize = {
  moduleMm: number;
  /** Side of the dark square. */
  symbolMm: number;
  quietMm: number;
  /** Side with the quiet zone on both sides. */
  totalMm: number;
  /** The address is so long that the symbol had to grow past 30 mm. */
  grown: boolean;
};

/** How large a symbol is printed: 30 mm, or what its modules need at 0.8 mm each. */
export function qrSize(modules: number): QrSize {
  const symbolMm = Math.max(LEAST_SYMBOL_MM, modules * LEAST_MODULE_MM);
  const moduleMm = symbolMm / modules;
  const quietMm = QUIET_MODULES * moduleMm;
  return {
    moduleMm,
    symbolMm,
    quietMm,
    totalMm: symbolMm + 2 * quietMm,
    grown: modules * LEAST_MODULE_MM > LEAST_SYMBOL_MM,
  };
}

/**
 * Traces the dark modules into closed outlines, so that a printer sees one area and no seams between
 * modules. Every edge between dark and light is walked once, dark on the right.
 */
function outline(dark: (column: number, row: number) => boolean, size: number): string {
  const at = (column: number, row: number): boolean =>
    column >= 0 && row >= 0 && column < size && row < size && dark(column, row);
  const corners = size + 1;
  /** From a corner, by direction (0 right, 1 down, 2 left, 3 up): is there an edge that leaves it? */
  const edges = new Uint8Array(corners * corners);
  const mark = (column: number, row: number, direction: number) => {
    edges[row * corners + column] = (edges[row * corners + column] ?? 0) | (1 << direction);
  };
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < size; column += 1) {
      if (!at(column, row)) continue;
      if (!at(column, row - 1)) mark(column, row, 0);
      if (!at(column + 1, row)) mark(column + 1, row, 1);
      if (!at(column, row + 1)) mark(column + 1, row + 1, 2);
      if (!at(column - 1, row)) mark(column, row + 1, 3);
    }
  }
  let path = "";
  for (let start = 0; start < edges.length; start += 1) {
    while (edges[start]) path += walk(edges, start, corners);
  }
  return path;
}

const STEPS = [
  [1, 0],
  [0, 1],
  [-1, 0],
  [0, -1],
] as const;

/** Follows one outline from a corner until it is back, taking its edges out; straight runs become one line. */
function walk(edges: Uint8Array, start: number, corners: number): string {
  let corner = start;
  let direction = leaving(edges[corner] ?? 0, 0);
  let run = 0;
  let path = `M${start % corners} ${Math.floor(start / corners)}`;
  do {
    edges[corner] = (edges[corner] ?? 0) & ~(1 << direction);
    const [across, down] = STEPS[direction] ?? STEPS[0];
    corner += down * corners + across;
    run += 1;
    const next = corner === start ? direction : leaving(edges[corner] ?? 0, direction);
    if (next !== direction && corner !== start) {
      path += lineOf(direction, run);
      run = 0;
    }
    direction = next;
  } while (corner !== start);
  // The last line back to the start is what `z` draws.
  return `${path}z`;
}

/** The edge to go on by: straight on where possible, else the one that is there (right turn first). */
function leaving(edges: number, direction: number): number {
  for (const turn of [1, 0, 3]) {
    const next = (direction + turn) % 4;
    if (edges & (1 << next)) return next;
  }
  return direction;
}

function lineOf(direction: number, run: number): string {
  const length = direction === 2 || direction === 3 ? -run : run;
  return `${direction % 2 === 0 ? "h" : "v"}${length}`;
}
