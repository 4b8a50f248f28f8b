/** A tag as grey pixels from its symbol alone, for films and photos: no printer, no other program. */
import { qrSymbol } from "@/lib/bags/rules/qr";
import type { GreyImage } from "./scan-sheets";

/** The outline of a symbol (M, h, v, z in module units, even-odd) as dark modules, row by row. */
export function modulesOf(path: string, modules: number): Uint8Array {
  const dark = new Uint8Array(modules * modules);
  let [column, row, startColumn, startRow] = [0, 0, 0, 0];
  // Everything right of an upright edge changes its side; a symbol's modules have crossed an odd number.
  const cross = (at: number, from: number, to: number) => {
    for (let line = Math.min(from, to); line < Math.max(from, to); line += 1) {
      for (let right = at; right < modules; right += 1) dark[line * modules + right]! ^= 1;
    }
  };
  for (const [, command, numbers] of path.matchAll(/([Mhvz])([-\d ]*)/g)) {
    const values = (numbers ?? "").trim().split(/\s+/).map(Number);
    if (command === "M") {
      [column, row] = [values[0] ?? 0, values[1] ?? 0];
      [startColumn, startRow] = [column, row];
    } else if (command === "h") column += values[0] ?? 0;
    else if (command === "v") {
      cross(column, row, row + (values[0] ?? 0));
      row += values[0] ?? 0;
    } else {
      cross(startColumn, row, startRow);
    }
  }
  return dark;
}

/** The symbol of a text, with its quiet zone, `modulePx` pixels a module. */
export function drawnTag(text: string, modulePx = 8): GreyImage {
  const { path, modules } = qrSymbol(text);
  const dark = modulesOf(path, modules);
  const side = (modules + 8) * modulePx;
  const pixels = Buffer.alloc(side * side, 235);
  for (let row = 0; row < side; row += 1) {
    for (let column = 0; column < side; column += 1) {
      const [x, y] = [Math.floor(column / modulePx) - 4, Math.floor(row / modulePx) - 4];
      const inside = x >= 0 && y >= 0 && x < modules && y < modules;
      if (inside && dark[y * modules + x]) pixels[row * side + column] = 30;
    }
  }
  return { width: side, height: side, pixels };
}
