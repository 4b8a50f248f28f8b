import { describe, expect, it } from "vitest";
import {
  colourDifference,
  labOfHex,
  labOfRgb,
  middleColour,
  nearestColours,
  tooClose,
  type ComparedColour,
  type Lab,
} from "@/lib/core/colour";
import { FIRST_PALETTE } from "@/lib/stock/terms";

type Rgb = readonly [number, number, number];

/** An RGBA picture whose pixel at (x, y) is what `paint` says. */
function picture(
  width: number,
  height: number,
  paint: (x: number, y: number) => Rgb | readonly [number, number, number, number],
): Uint8ClampedArray {
  const pixels = new Uint8ClampedArray(width * height * 4);
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      const [red, green, blue, alpha = 255] = paint(x, y);
      pixels.set([red, green, blue, alpha], (y * width + x) * 4);
    }
  }
  return pixels;
}

const BLUE: Rgb = [31, 70, 214];
const near = (lab: Lab | null, rgb: Rgb) => {
  expect(lab).not.toBeNull();
  if (lab) expect(colourDifference(lab, labOfRgb(...rgb))).toBeLessThan(0.01);
};

describe("labOfHex", () => {
  it("takes six signs and nothing else", () => {
    expect(labOfHex("#1F46D6")).toEqual(labOfRgb(...BLUE));
    for (const wrong of ["1f46d6", "#1f4", "blue", "", "#1f46d6ff"])
      expect(labOfHex(wrong)).toBeNull();
  });
});

describe("middleColour", () => {
  it("is the colour of an even picture, whatever its size, shape and channels", () => {
    for (const [width, height] of [
      [1, 1],
      [2, 3],
      [640, 480],
      [5, 900],
    ] as const) {
      near(
        middleColour(
          picture(width, height, () => BLUE),
          width,
          height,
          4,
        ),
        BLUE,
      );
    }
    const rgb = new Uint8Array(Array.from({ length: 16 }, () => BLUE).flat());
    near(middleColour(rgb, 4, 4, 3), BLUE);
    near(middleColour(new Uint8Array(16).fill(120), 4, 4, 1), [120, 120, 120]);
  });

  it("reads the middle and not what lies around it", () => {
    const inside = (at: number, size: number) => at >= size / 4 && at < (size * 3) / 4;
    const pixels = picture(200, 120, (x, y) =>
      inside(x, 200) && inside(y, 120) ? BLUE : [240, 180, 41],
    );
    near(middleColour(pixels, 200, 120, 4), BLUE);
  });

  it("leaves out glare and shadow of up to a fifth each", () => {
    const pixels = picture(100, 100, (x) =>
      x % 10 === 0 ? [250, 250, 252] : x % 10 === 5 ? [9, 12, 20] : BLUE,
    );
    near(middleColour(pixels, 100, 100, 4), BLUE);
  });

  it("leaves out burnt-out pixels, however many", () => {
    const pixels = picture(100, 100, (x) => (x % 2 === 0 ? [255, 255, 255] : BLUE));
    near(middleColour(pixels, 100, 100, 4), BLUE);
  });

  it("is the mean of an uneven colour", () => {
    const light: Rgb = [60, 100, 220];
    const pixels = picture(128, 128, (x, y) => ((x + y) % 2 === 0 ? BLUE : light));
    const lab = middleColour(pixels, 128, 128, 4);
    const [one, other] = [labOfRgb(...BLUE), labOfRgb(...light)];
    expect(lab?.l).toBeCloseTo((one.l + other.l) / 2, 6);
    expect(lab?.b).toBeCloseTo((one.b + other.b) / 2, 6);
  });

  it("says nothing of a picture that shows nothing", () => {
    const even = (rgba: readonly [number, number, number, number]) =>
      middleColour(
        picture(40, 40, () => rgba),
        40,
        40,
        4,
      );
    expect(even([255, 255, 255, 255])).toBeNull();
    expect(even([0, 0, 0, 255])).toBeNull();
    expect(even([31, 70, 214, 0])).toBeNull();
    expect(middleColour(new Uint8Array(), 0, 0, 4)).toBeNull();
  });
});

const solid = FIRST_PALETTE.filter(({ look }) => look === "solid");

describe("nearestColours", () => {
  it.each(solid)("finds $name by its own value", ({ hex, code }) => {
    const lab = labOfHex(hex);
    if (!lab) throw new Error(hex);
    const [first] = nearestColours(lab, FIRST_PALETTE);
    expect(first?.colour.code).toBe(code);
    expect(first?.difference).toBeCloseTo(0, 6);
  });

  it("offers three, nearest first, never clear or mixed", () => {
    const cream = labOfRgb(230, 230, 220);
    const offered = nearestColours(cream, FIRST_PALETTE);
    expect(offered).toHaveLength(3);
    expect(offered[0]?.colour.name).toBe("White");
    expect(offered.every(({ colour }) => colour.look === "solid")).toBe(true);
    expect(offered.map(({ difference }) => difference)).toEqual(
      offered.map(({ difference }) => difference).toSorted((one, other) => one - other),
    );
    expect(nearestColours(cream, FIRST_PALETTE, 99)).toHaveLength(solid.length);
  });
});

describe("tooClose", () => {
  it("finds nothing in the first palette", () => {
    expect(tooClose(FIRST_PALETTE)).toEqual([]);
  });

  it("names each pair once, closest first", () => {
    const colour = (hex: string, look: ComparedColour["look"] = "solid") => ({ hex, look });
    const [blue, near1, far, near2] = [
      colour("#1f46d6"),
      colour("#1f48d6"),
      colour("#f0b429"),
      colour("#2a50dc"),
    ];
    const found = tooClose([blue, near1, far, near2, colour("#1f46d6", "clear")]);
    expect(found.map(({ one, other }) => [one.hex, other.hex])).toEqual([
      ["#1f46d6", "#1f48d6"],
      ["#1f48d6", "#2a50dc"],
      ["#1f46d6", "#2a50dc"],
    ]);
    expect(found.every(({ difference }) => difference > 0 && difference < 5)).toBe(true);
  });
});
