/**
 * The squares in a symbol's corners, mended. Decoders look for dark, light, dark, light, dark as 1:1:3:1:1 along
 * a row and then want the same along the column; a reflection or a splash over one side of a square hides the
 * whole symbol from them. Here one direction is enough, and the square is drawn anew. Only where the symbol is
 * comes from this, never what it says: its text is still the decoder's, with its error correction.
 */
import type { Grey } from "./grey";

/** A run of lines that cross a square: along the line, and from the first line to the last, all in pixels. */
type Crossing = {
  firstLine: number;
  lastLine: number;
  firstMiddle: number;
  lastMiddle: number;
  /** Sum of lengths of all lines. */
  length: number;
  lines: number;
};
type Square = { x: number; y: number; modulePx: number; angle: number; weight: number };

/** How far a run may be off its share, in modules. */
const OFF = 0.6;
const LEAST_MODULE_PX = 1.6;
const MOST_SQUARES = 10;

const isNear = (run: number, modules: number, modulePx: number): boolean =>
  Math.abs(run - modules * modulePx) <= OFF * modulePx * (modules > 1 ? 1.6 : 1);

/** Lines of a black and white picture (rows, or columns when upright) that cross a square, joined. */
function crossings({ width, height, data }: Grey, upright: boolean): Crossing[] {
  const [lines, length] = upright ? [width, height] : [height, width];
  const [step, lineStep] = upright ? [width, 1] : [1, width];
  const done: Crossing[] = [];
  let open: Crossing[] = [];
  const ends = new Int32Array(length + 1);
  for (let line = 0; line < lines; line += 1) {
    const start = line * lineStep;
    let count = 0;
    for (let place = 1; place < length; place += 1) {
      if (data[start + place * step] !== data[start + (place - 1) * step]) ends[count++] = place;
    }
    for (let at = 0; at + 5 < count; at += 1) {
      const edge = (which: number): number => ends[at + which] ?? 0;
      if ((data[start + edge(0) * step] ?? 0) !== 0) continue;
      const long = edge(5) - edge(0);
      const modulePx = long / 7;
      if (modulePx < LEAST_MODULE_PX) continue;
      const fits = [1, 1, 3, 1, 1].every((share, run) =>
        isNear(edge(run + 1) - edge(run), share, modulePx),
      );
      if (!fits) continue;
      const middle = (edge(2) + edge(3)) / 2;
      const known = open.find(
        (each) =>
          line - each.lastLine <= 2 &&
          Math.abs(each.lastMiddle - middle) <= Math.max(2, modulePx / 2),
      );
      if (known) {
        known.lastLine = line;
        known.lastMiddle = middle;
        known.length += long;
        known.lines += 1;
      } else {
        open.push({
          firstLine: line,
          lastLine: line,
          firstMiddle: middle,
          lastMiddle: middle,
          length: long,
          lines: 1,
        });
      }
    }
    for (const each of open) if (line - each.lastLine > 2) done.push(each);
    open = open.filter((each) => line - each.lastLine <= 2);
  }
  return [...done, ...open];
}

function squaresOf(grey: Grey): Square[] {
  const found: Square[] = [];
  for (const upright of [true, false]) {
    for (const each of crossings(grey, upright)) {
      const across = each.lastLine - each.firstLine + 1;
      const slope = across > 1 ? (each.lastMiddle - each.firstMiddle) / (across - 1) : 0;
      // A line at an angle is longer by its cosine.
      const modulePx = (each.length / each.lines / 7) * Math.cos(Math.atan(slope));
      if (across < 1.3 * modulePx || across > 5 * modulePx) continue;
      const line = (each.firstLine + each.lastLine) / 2 + 0.5;
      const middle = (each.firstMiddle + each.lastMiddle) / 2;
      found.push({
        x: upright ? line : middle,
        y: upright ? middle : line,
        modulePx,
        angle: upright ? Math.atan(slope) : -Math.atan(slope),
        weight: Math.min(each.lines, 3 * modulePx) / modulePx,
      });
    }
  }
  found.sort((a, b) => b.weight - a.weight);
  // What both directions found is one square.
  return found
    .filter(
      (square, at) =>
        !found
          .slice(0, at)
          .some(
            (other) => Math.hypot(other.x - square.x, other.y - square.y) < 2 * square.modulePx,
          ),
    )
    .slice(0, MOST_SQUARES);
}

/**
 * A black and white picture with its squares drawn anew.
 *
 * @returns null when there are none to mend or too few for a symbol
 */
export function mended(grey: Grey): Grey | null {
  const squares = squaresOf(grey);
  if (squares.length < 3) return null;
  const data = grey.data.slice();
  for (const { x, y, modulePx, angle } of squares) {
    const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
    const reach = Math.ceil(6 * modulePx);
    for (
      let row = Math.max(0, Math.floor(y - reach));
      row <= Math.min(grey.height - 1, y + reach);
      row += 1
    ) {
      for (
        let column = Math.max(0, Math.floor(x - reach));
        column <= Math.min(grey.width - 1, x + reach);
        column += 1
      ) {
        const [dx, dy] = [column + 0.5 - x, row + 0.5 - y];
        const ring =
          Math.max(Math.abs(dx * cos + dy * sin), Math.abs(dy * cos - dx * sin)) / modulePx;
        if (ring > 4.3) continue;
        const dark = ring < 1.5 || (ring > 2.5 && ring < 3.5);
        data[row * grey.width + column] = dark ? 0 : 255;
      }
    }
  }
  return { ...grey, data };
}
