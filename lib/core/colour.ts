/**
 * Colour of plastic: how it is measured in a picture and how far two colours are apart.
 *
 * Everything is in CIELAB against D65, the white of sRGB: L 0 to 100, a and b about -125 to 125. A difference
 * is ΔE00 (CIEDE2000; Sharma, Wu and Dalal, Color Research and Application 30(1), 2005): about 1 is just
 * seen side by side, under {@link CLOSE_DIFFERENCE} two plastics are taken for the same.
 */
import {
  differenceCiede2000,
  modeLab65,
  modeRgb,
  parseHex,
  useMode as registered,
} from "culori/fn";

/** CIELAB, D65. */
export type Lab = { l: number; a: number; b: number };

/** ΔE00 under which two colours are hard to tell apart in a bin. */
export const CLOSE_DIFFERENCE = 5;

registered(modeRgb);
const toLab65 = registered(modeLab65);
const ciede2000 = differenceCiede2000();

/** sRGB with channels 0 to 255 (IEC 61966-2-1) as CIELAB. */
export function labOfRgb(red: number, green: number, blue: number): Lab {
  const { l, a, b } = toLab65({ mode: "rgb", r: red / 255, g: green / 255, b: blue / 255 });
  return { l, a, b };
}

/** "#1f46d6" as CIELAB; null for what is no such value. */
export function labOfHex(hex: string): Lab | null {
  const rgb = /^#[0-9a-f]{6}$/i.test(hex) ? parseHex(hex) : undefined;
  if (!rgb) return null;
  const { l, a, b } = toLab65(rgb);
  return { l, a, b };
}

/** ΔE00 between two colours, 0 for the same, all weights 1. */
export function colourDifference(one: Lab, other: Lab): number {
  return ciede2000({ mode: "lab65", ...one }, { mode: "lab65", ...other });
}

/** What of a palette colour is compared. A see-through or many-coloured one has no colour of its own. */
export type ComparedColour = { hex: string; look: "solid" | "clear" | "mixed" };

type Measured<C> = { colour: C; lab: Lab };

function measured<C extends ComparedColour>(palette: readonly C[]): Measured<C>[] {
  return palette.flatMap((colour) => {
    const lab = colour.look === "solid" ? labOfHex(colour.hex) : null;
    return lab ? [{ colour, lab }] : [];
  });
}

/**
 * The palette colours that are nearest to a measured one, nearest first, each with its ΔE00. Only solid ones:
 * a see-through plastic shows what lies behind it.
 */
export function nearestColours<C extends ComparedColour>(
  lab: Lab,
  palette: readonly C[],
  count = 3,
): { colour: C; difference: number }[] {
  return measured(palette)
    .map((known) => ({ colour: known.colour, difference: colourDifference(lab, known.lab) }))
    .sort((one, other) => one.difference - other.difference)
    .slice(0, count);
}

/**
 * Pairs of palette colours with a ΔE00 under `limit`, closest first, in the palette's order inside a pair.
 * Only solid ones are compared.
 */
export function tooClose<C extends ComparedColour>(
  palette: readonly C[],
  limit = CLOSE_DIFFERENCE,
): { one: C; other: C; difference: number }[] {
  const known = measured(palette);
  return known
    .flatMap((one, at) =>
      known.slice(at + 1).map((other) => ({
        one: one.colour,
        other: other.colour,
        difference: colourDifference(one.lab, other.lab),
      })),
    )
    .filter(({ difference }) => difference < limit)
    .sort((one, other) => one.difference - other.difference);
}

/** Side of the grid that is read from the middle: more points change the mean by less than is seen. */
const GRID = 64;
/** A channel at its end says only "more than this": the pixel's colour is lost. */
const CLIPPED_HIGH = 254;
const CLIPPED_LOW = 1;
/** Share of the points that is left out at each end of lightness: glare above, shadow below. */
const TRIMMED = 0.2;
/** Fewer usable points than this share of the middle are no measurement. */
const LEAST_USABLE = 0.1;

/**
 * The colour of what a picture shows in its middle: the mean in CIELAB of the middle half of its width and
 * height, read on a grid of at most 64 by 64 points. Pixels that are burnt out or pitch black in all channels
 * are no colour and are left out, as are transparent ones; then the lightest and the darkest fifth.
 *
 * @param pixels rows from the top, `channels` bytes a pixel: 1 grey, 3 RGB, 4 RGBA; sRGB
 * @returns null when less than a tenth of the middle is usable
 */
export function middleColour(
  pixels: Uint8Array | Uint8ClampedArray,
  width: number,
  height: number,
  channels: 1 | 3 | 4,
): Lab | null {
  const [left, top] = [Math.floor(width / 4), Math.floor(height / 4)];
  const [across, down] = [Math.ceil(width / 2), Math.ceil(height / 2)];
  const [columns, rows] = [Math.min(GRID, across), Math.min(GRID, down)];
  const usable: Lab[] = [];
  for (let row = 0; row < rows; row += 1) {
    const y = top + Math.floor(((row + 0.5) * down) / rows);
    for (let column = 0; column < columns; column += 1) {
      const x = left + Math.floor(((column + 0.5) * across) / columns);
      const lab = pixelColour(pixels, (y * width + x) * channels, channels);
      if (lab) usable.push(lab);
    }
  }
  if (usable.length === 0 || usable.length < columns * rows * LEAST_USABLE) return null;
  usable.sort((one, other) => one.l - other.l);
  const cut = Math.floor(usable.length * TRIMMED);
  const kept = usable.slice(cut, usable.length - cut);
  const sum = kept.reduce((so, { l, a, b }) => ({ l: so.l + l, a: so.a + a, b: so.b + b }));
  return { l: sum.l / kept.length, a: sum.a / kept.length, b: sum.b / kept.length };
}

function pixelColour(
  pixels: Uint8Array | Uint8ClampedArray,
  at: number,
  channels: 1 | 3 | 4,
): Lab | null {
  const red = pixels[at] ?? 0;
  const green = (channels === 1 ? red : pixels[at + 1]) ?? 0;
  const blue = (channels === 1 ? red : pixels[at + 2]) ?? 0;
  if (channels === 4 && (pixels[at + 3] ?? 0) < 128) return null;
  if (Math.min(red, green, blue) >= CLIPPED_HIGH || Math.max(red, green, blue) <= CLIPPED_LOW) {
    return null;
  }
  return labOfRgb(red, green, blue);
}
