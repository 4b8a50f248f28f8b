/** Grey pictures as the decoder takes them, and what can be done to one before it is tried again. */

export type Grey = { width: number; height: number; data: Uint8Array };

/** Luma of RGBA pixels (BT.601 in 1/1024, as the decoder's own). */
export function greyOf(rgba: Uint8ClampedArray, width: number, height: number): Grey {
  const data = new Uint8Array(width * height);
  for (let at = 0, from = 0; at < data.length; at += 1, from += 4) {
    data[at] =
      (306 * (rgba[from] ?? 0) + 601 * (rgba[from + 1] ?? 0) + 117 * (rgba[from + 2] ?? 0) + 512) >>
      10;
  }
  return { width, height, data };
}

/** Room that is kept between pictures: ten frames a second would else leave 50 MB of waste in each. */
const kept = { sums: new Float64Array(0), mean: new Float32Array(0), squares: new Float32Array(0) };

function roomFor(pixels: number, sums: number): void {
  if (kept.mean.length < pixels) {
    kept.mean = new Float32Array(pixels);
    kept.squares = new Float32Array(pixels);
  }
  if (kept.sums.length < sums) kept.sums = new Float64Array(sums);
}

/**
 * Means over squares of side 2 × reach + 1, cut off at the border: an integral image, four look-ups a pixel. The
 * answer is kept room: good until the next call of the same sort.
 */
function means({ width, height, data }: Grey, reach: number, squared: boolean): Float32Array {
  const wide = width + 1;
  // Float64 holds sums of squares of a photo exactly.
  roomFor(width * height, wide * (height + 1));
  const { sums } = kept;
  sums.fill(0, 0, wide);
  for (let row = 0; row < height; row += 1) {
    let line = 0;
    sums[(row + 1) * wide] = 0;
    for (let column = 0; column < width; column += 1) {
      const value = data[row * width + column] ?? 0;
      line += squared ? value * value : value;
      sums[(row + 1) * wide + column + 1] = (sums[row * wide + column + 1] ?? 0) + line;
    }
  }
  const out = squared ? kept.squares : kept.mean;
  for (let row = 0; row < height; row += 1) {
    const top = Math.max(0, row - reach) * wide;
    const foot = Math.min(height, row + reach + 1) * wide;
    for (let column = 0; column < width; column += 1) {
      const left = Math.max(0, column - reach);
      const right = Math.min(width, column + reach + 1);
      const sum =
        (sums[foot + right] ?? 0) -
        (sums[foot + left] ?? 0) -
        (sums[top + right] ?? 0) +
        (sums[top + left] ?? 0);
      out[row * width + column] = sum / ((right - left) * ((foot - top) / wide));
    }
  }
  return out;
}

/** Mean over squares of side 2 × reach + 1: takes noise away, and small detail with it. */
function smoothed(grey: Grey, reach: number): Grey {
  return {
    ...grey,
    data: Uint8Array.from(means(grey, reach, false).subarray(0, grey.data.length)),
  };
}

/**
 * Every neighbourhood stretched to the same mean and spread: faded ink, shade and glare's rim become alike.
 * Where there is nothing but noise it is not stretched without end.
 */
export function levelled(grey: Grey, reach: number, leastSpread: number): Grey {
  const mean = means(grey, reach, false);
  const squares = means(grey, reach, true);
  const data = new Uint8Array(grey.data.length);
  for (let at = 0; at < data.length; at += 1) {
    const middle = mean[at] ?? 0;
    const spread = Math.sqrt(Math.max(0, (squares[at] ?? 0) - middle * middle));
    const value = 128 + (((grey.data[at] ?? 0) - middle) * 80) / Math.max(leastSpread, spread);
    data[at] = value < 0 ? 0 : value > 255 ? 255 : value;
  }
  return { ...grey, data };
}

/** Black where it is darker than its neighbourhood by `bias`, else white. */
export function thresholded(grey: Grey, reach: number, bias: number): Grey {
  const mean = means(grey, reach, false);
  const data = new Uint8Array(grey.data.length);
  for (let at = 0; at < data.length; at += 1) {
    data[at] = (grey.data[at] ?? 0) < (mean[at] ?? 0) - bias ? 0 : 255;
  }
  return { ...grey, data };
}

/** What differs from the neighbourhood's mean is made larger: against blur. */
export function sharpened(grey: Grey, reach: number, amount: number): Grey {
  const mean = means(grey, reach, false);
  const data = new Uint8Array(grey.data.length);
  for (let at = 0; at < data.length; at += 1) {
    const here = grey.data[at] ?? 0;
    const value = here + (here - (mean[at] ?? 0)) * amount;
    data[at] = value < 0 ? 0 : value > 255 ? 255 : value;
  }
  return { ...grey, data };
}

/** Another size, blended between pixels; when it becomes smaller, means of what falls together. */
export function resized(grey: Grey, factor: number): Grey {
  const width = Math.max(1, Math.round(grey.width * factor));
  const height = Math.max(1, Math.round(grey.height * factor));
  const from = factor < 0.75 ? smoothed(grey, Math.max(1, Math.round(0.35 / factor))) : grey;
  const data = new Uint8Array(width * height);
  const lastColumn = from.width - 1;
  const lastRow = from.height - 1;
  for (let row = 0; row < height; row += 1) {
    const y = Math.min(lastRow, Math.max(0, (row + 0.5) / factor - 0.5));
    const top = y | 0;
    const down = y - top;
    const upper = top * from.width;
    const lower = Math.min(lastRow, top + 1) * from.width;
    for (let column = 0; column < width; column += 1) {
      const x = Math.min(lastColumn, Math.max(0, (column + 0.5) / factor - 0.5));
      const left = x | 0;
      const right = x - left;
      const next = left < lastColumn ? left + 1 : left;
      const above =
        (from.data[upper + left] ?? 0) * (1 - right) + (from.data[upper + next] ?? 0) * right;
      const below =
        (from.data[lower + left] ?? 0) * (1 - right) + (from.data[lower + next] ?? 0) * right;
      data[row * width + column] = above * (1 - down) + below * down + 0.5;
    }
  }
  return { width, height, data };
}

/** A part of a picture; what is outside is left out. */
export function cropped(grey: Grey, left: number, top: number, right: number, foot: number): Grey {
  const [fromX, fromY] = [Math.max(0, Math.floor(left)), Math.max(0, Math.floor(top))];
  const width = Math.max(1, Math.min(grey.width, Math.ceil(right)) - fromX);
  const height = Math.max(1, Math.min(grey.height, Math.ceil(foot)) - fromY);
  const data = new Uint8Array(width * height);
  for (let row = 0; row < height; row += 1) {
    const start = (fromY + row) * grey.width + fromX;
    data.set(grey.data.subarray(start, start + width), row * width);
  }
  return { width, height, data };
}

/**
 * Pulled apart by `factor` along one direction of the picture (radians, 0 to the right) and turned so that this
 * is its new horizontal: takes back what looking from the side had pressed together.
 */
export function stretched(grey: Grey, angle: number, factor: number): Grey {
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  const [halfX, halfY] = [grey.width / 2, grey.height / 2];
  const width = Math.ceil((Math.abs(cos) * grey.width + Math.abs(sin) * grey.height) * factor);
  const height = Math.ceil(Math.abs(sin) * grey.width + Math.abs(cos) * grey.height);
  const data = new Uint8Array(width * height).fill(128);
  for (let row = 0; row < height; row += 1) {
    const across = row + 0.5 - height / 2;
    for (let column = 0; column < width; column += 1) {
      const along = (column + 0.5 - width / 2) / factor;
      const x = halfX + along * cos - across * sin - 0.5;
      const y = halfY + along * sin + across * cos - 0.5;
      if (x < 0 || y < 0 || x >= grey.width - 1 || y >= grey.height - 1) continue;
      const [left, top] = [x | 0, y | 0];
      const [right, down] = [x - left, y - top];
      const at = top * grey.width + left;
      const above = (grey.data[at] ?? 0) * (1 - right) + (grey.data[at + 1] ?? 0) * right;
      const below =
        (grey.data[at + grey.width] ?? 0) * (1 - right) +
        (grey.data[at + grey.width + 1] ?? 0) * right;
      data[row * width + column] = above * (1 - down) + below * down + 0.5;
    }
  }
  return { width, height, data };
}

/** The level under which this share of the pixels is. */
function level(grey: Grey, share: number): number {
  const counts = new Uint32Array(256);
  for (const value of grey.data) counts[value] = (counts[value] ?? 0) + 1;
  let left = share * grey.data.length;
  for (let value = 0; value < 256; value += 1) {
    left -= counts[value] ?? 0;
    if (left <= 0) return value;
  }
  return 255;
}

/** Black where it is close to the darkest there is, white elsewhere. */
export function darkest(grey: Grey): Grey {
  const [ink, paper] = [level(grey, 0.005), level(grey, 0.97)];
  const limit = ink + (paper - ink) * 0.18;
  return { ...grey, data: grey.data.map((value) => (value < limit ? 0 : 255)) };
}

/** Along rows or columns: the largest (or smallest) of `2 × reach + 1` neighbours. */
function extreme(
  from: Uint8Array,
  width: number,
  height: number,
  reach: number,
  upright: boolean,
  largest: boolean,
): Uint8Array {
  const out = new Uint8Array(from.length);
  const [lines, length] = upright ? [width, height] : [height, width];
  const [step, lineStep] = upright ? [width, 1] : [1, width];
  for (let line = 0; line < lines; line += 1) {
    const start = line * lineStep;
    for (let place = 0; place < length; place += 1) {
      const until = Math.min(length - 1, place + reach);
      let best = from[start + place * step] ?? 0;
      for (let near = Math.max(0, place - reach); near <= until; near += 1) {
        const value = from[start + near * step] ?? 0;
        if (largest ? value > best : value < best) best = value;
      }
      out[start + place * step] = best;
    }
  }
  return out;
}

/**
 * Black where it is darker than this share of the paper around it. The paper is what remains when everything
 * narrower than twice `reach` is filled with its surroundings, so that ink in the rim of a reflection, which is
 * brighter than paper elsewhere, still counts as ink.
 */
export function againstPaper(grey: Grey, reach: number, share: number): Grey {
  const { width, height, data } = grey;
  let paper = data;
  for (const largest of [true, false]) {
    paper = extreme(paper, width, height, reach, false, largest);
    paper = extreme(paper, width, height, reach, true, largest);
  }
  const out = new Uint8Array(data.length);
  for (let at = 0; at < out.length; at += 1) {
    out[at] = (data[at] ?? 0) < (paper[at] ?? 0) * share ? 0 : 255;
  }
  return { width, height, data: out };
}
