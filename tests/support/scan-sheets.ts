/**
 * A printed sheet as a scanner meets it: rendered to grey pixels by poppler (pdftoppm), cut into its labels,
 * read by zbar (zbarimg). Cut, because a phone too is held to one tag at a time.
 */
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";

/** Grey pixels, row by row, 0 black to 255 white. */
export type GreyImage = { width: number; height: number; pixels: Buffer };
/** In millimetres from the image's top left corner. */
export type BoxMm = { leftMm: number; topMm: number; widthMm: number; heightMm: number };

const MM_PER_INCH = 25.4;

/** The first of the tools that is missing here, or null. */
export function missingPrintTool(): string | null {
  for (const [tool, flag] of [
    ["pdftoppm", "-v"],
    ["pdfinfo", "-v"],
    ["zbarimg", "--version"],
  ] as const) {
    try {
      execFileSync(tool, [flag], { stdio: "ignore" });
    } catch {
      return tool;
    }
  }
  return null;
}

/** Pages of a PDF with their sizes in millimetres. */
export function pageSizes(pdf: string): { widthMm: number; heightMm: number }[] {
  const text = execFileSync("pdfinfo", ["-l", "1000", pdf], { encoding: "utf8" });
  return [...text.matchAll(/^Page\s+\d+ size:\s+([\d.]+) x ([\d.]+) pts/gm)].map((match) => ({
    widthMm: (Number(match[1]) / 72) * MM_PER_INCH,
    heightMm: (Number(match[2]) / 72) * MM_PER_INCH,
  }));
}

/** Every page of a PDF at a resolution, in order. */
export function renderPages(pdf: string, dpi: number): GreyImage[] {
  const folder = fs.mkdtempSync(`${pdf}-pages-`);
  execFileSync("pdftoppm", ["-gray", "-r", String(dpi), pdf, path.join(folder, "page")]);
  const files = fs.readdirSync(folder).sort();
  const pages = files.map((file) => readPgm(fs.readFileSync(path.join(folder, file))));
  fs.rmSync(folder, { recursive: true });
  return pages;
}

function readPgm(file: Buffer): GreyImage {
  const head = /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(file.subarray(0, 64).toString("latin1"));
  if (!head) throw new Error("not a binary grey image of eight bits");
  const [width, height] = [Number(head[1]), Number(head[2])];
  return { width, height, pixels: file.subarray(head[0].length, head[0].length + width * height) };
}

/** Cuts a box out of a page. */
export function cut(page: GreyImage, box: BoxMm, dpi: number): GreyImage {
  const px = (mm: number) => Math.round((mm / MM_PER_INCH) * dpi);
  const left = Math.max(0, px(box.leftMm));
  const top = Math.max(0, px(box.topMm));
  const width = Math.min(px(box.widthMm), page.width - left);
  const height = Math.min(px(box.heightMm), page.height - top);
  const rows = Array.from({ length: height }, (_, row) => {
    const start = (top + row) * page.width + left;
    return page.pixels.subarray(start, start + width);
  });
  return { width, height, pixels: Buffer.concat(rows) };
}

/** The smallest box around everything dark; null for an empty one. */
export function darkBox(image: GreyImage, dpi: number): BoxMm | null {
  let [left, top, right, bottom] = [image.width, image.height, -1, -1];
  for (let row = 0; row < image.height; row += 1) {
    for (let column = 0; column < image.width; column += 1) {
      if ((image.pixels[row * image.width + column] ?? 255) > 128) continue;
      left = Math.min(left, column);
      right = Math.max(right, column);
      top = Math.min(top, row);
      bottom = Math.max(bottom, row);
    }
  }
  if (right < 0) return null;
  const mm = (px: number) => (px / dpi) * MM_PER_INCH;
  return {
    leftMm: mm(left),
    topMm: mm(top),
    widthMm: mm(right - left + 1),
    heightMm: mm(bottom - top + 1),
  };
}

/** What zbar reads from each image, in order; null where it reads nothing. */
export function readSymbols(images: readonly GreyImage[], folder: string): (string | null)[] {
  return images.map((image, at) => {
    const file = path.join(folder, `label-${at}.pgm`);
    const head = Buffer.from(`P5\n${image.width} ${image.height}\n255\n`, "latin1");
    fs.writeFileSync(file, Buffer.concat([head, image.pixels]));
    try {
      const flags = ["-q", "--raw", "-Sdisable", "-Sqrcode.enable", file];
      return execFileSync("zbarimg", flags, {
        encoding: "utf8",
        stdio: ["ignore", "pipe", "ignore"],
      }).trimEnd();
    } catch (error) {
      // zbarimg ends with 4 when it finds no symbol; anything else is trouble of its own.
      if (error instanceof Error && "status" in error && error.status === 4) return null;
      throw error;
    } finally {
      fs.rmSync(file);
    }
  });
}
