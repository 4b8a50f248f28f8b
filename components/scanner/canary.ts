/** The picture that an engine must read before it counts. */
import { canvasOf } from "./frame-loop";

export const CANARY_TEXT = "BISMAR TEST";

/** Its symbol, a row a number, the leftmost module the highest bit; a test compares it with the tag's encoder. */
export const CANARY_ROWS = [
  0x1fd17f, 0x105641, 0x17555d, 0x17595d, 0x175b5d, 0x104541, 0x1fd57f, 0x001800, 0x0d665f,
  0x133c1c, 0x135171, 0x1c8cba, 0x12f655, 0x001a43, 0x1fd004, 0x104970, 0x17584b, 0x174aa2,
  0x175ec9, 0x105f93, 0x1fc2d9,
] as const;

const MODULE_PX = 8;
const QUIET = 4;

export function canaryPicture(): HTMLCanvasElement {
  const modules = CANARY_ROWS.length;
  const side = (modules + 2 * QUIET) * MODULE_PX;
  const canvas = canvasOf(side, side);
  const context = canvas.getContext("2d", { willReadFrequently: true });
  if (!context) return canvas;
  context.fillStyle = "#e6e2d8";
  context.fillRect(0, 0, side, side);
  context.fillStyle = "#201d1a";
  CANARY_ROWS.forEach((bits, row) => {
    for (let column = 0; column < modules; column += 1) {
      if (!(bits & (1 << (modules - 1 - column)))) continue;
      context.fillRect(
        (QUIET + column) * MODULE_PX,
        (QUIET + row) * MODULE_PX,
        MODULE_PX,
        MODULE_PX,
      );
    }
  });
  return canvas;
}
