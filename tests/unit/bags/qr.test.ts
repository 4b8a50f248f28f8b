import { describe, expect, it } from "vitest";
import QRCode from "qrcode";
import fc from "fast-check";
import { tagAddress, drawCode } from "@/lib/core/bag-code";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";

const CODE = drawCode(() => 20);
const ADDRESS = tagAddress("https://saltmarsh.example", CODE);

/** The vertical edges of a path's outlines; reads M, h, v and z as our paths use them. */
function verticalEdges(path: string): { x: number; top: number; bottom: number }[] {
  const edges: { x: number; top: number; bottom: number }[] = [];
  for (const part of path.split("z").filter(Boolean)) {
    const start = /^M(\d+) (\d+)/.exec(part);
    if (!start) throw new Error(`no start in ${part}`);
    const [startX, startY] = [Number(start[1]), Number(start[2])];
    let [x, y] = [startX, startY];
    const go = (toY: number) => {
      edges.push({ x, top: Math.min(y, toY), bottom: Math.max(y, toY) });
      y = toY;
    };
    for (const [, kind, length] of part.slice(start[0].length).matchAll(/([hv])(-?\d+)/g)) {
      if (kind === "h") x += Number(length);
      else go(y + Number(length));
    }
    // What z draws must be straight.
    expect(x === startX || y === startY).toBe(true);
    if (x === startX && y !== startY) go(startY);
  }
  return edges;
}

describe("qrSymbol", () => {
  it("stays in alphanumeric mode for a tag's address, at version 3 for an ordinary host", () => {
    const symbol = qrSymbol(ADDRESS);
    expect(symbol).toMatchObject({ alphanumeric: true, version: 3, modules: 29 });
  });

  it("gives a code of figures only the same size as any other", () => {
    const figures = drawCode(() => 7);
    expect(figures).toMatch(/^7{7}/);
    const address = tagAddress("https://saltmarsh.example", figures);
    expect(qrSymbol(address)).toMatchObject({ alphanumeric: true, version: 3, modules: 29 });
  });

  it("says so when a character pushes it into byte mode", () => {
    expect(qrSymbol("HTTPS://[::1]:3000/B/12345678").alphanumeric).toBe(false);
    expect(qrSymbol("https://saltmarsh.example/b/12345678").alphanumeric).toBe(false);
  });

  it("draws just the dark modules, whatever the code", () => {
    fc.assert(
      fc.property(fc.array(fc.nat(31), { minLength: 7, maxLength: 7 }), (draws) => {
        let at = 0;
        const code = drawCode(() => draws[at++] ?? at % 32);
        const text = tagAddress("https://saltmarsh.example", code);
        const { path, modules } = qrSymbol(text);
        const edges = verticalEdges(path);
        const content = [{ data: text, mode: "alphanumeric" as const }];
        const { data } = QRCode.create(content, { errorCorrectionLevel: "Q" }).modules;
        for (let row = 0; row < modules; row += 1) {
          for (let column = 0; column < modules; column += 1) {
            const [x, y] = [column + 0.5, row + 0.5];
            const crossed = edges.filter((edge) => edge.x < x && edge.top < y && y < edge.bottom);
            if ((crossed.length % 2 === 1) !== (data[row * modules + column] === 1)) return false;
          }
        }
        return true;
      }),
      { numRuns: 15 },
    );
  });
});

describe("qrSize", () => {
  it.each([
    // modules, symbol in mm: 30 mm until a module would be under 0.8 mm
    [25, 30, false],
    [29, 30, false],
    [37, 30, false],
    [41, 32.8, true],
    [45, 36, true],
  ])("%i modules print at %f mm", (modules, symbolMm, grown) => {
    const size = qrSize(modules);
    expect(size.symbolMm).toBeCloseTo(symbolMm, 9);
    expect(size.grown).toBe(grown);
    expect(size.moduleMm).toBeGreaterThanOrEqual(0.8 - 1e-9);
    expect(size.totalMm).toBeCloseTo((modules + 8) * size.moduleMm, 9);
  });
});
