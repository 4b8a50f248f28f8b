/**
 * One picture as it is kept: decoded and written anew, so that nothing of the file that was sent is served. At
 * most two at once, because a decoded picture can take 200 MB.
 */
import "server-only";
import sharp from "sharp";
import { AppError } from "@/lib/core/errors";
import { middleColour, type Lab } from "@/lib/core/colour";
import { pictureKind } from "../rules/content";
import { LARGE_EDGE_PIXELS, MOST_PHOTO_PIXELS, THUMB_EDGE_PIXELS } from "../terms";

export type Picture = {
  large: Buffer;
  thumb: Buffer;
  /** Of the large one, upright. */
  width: number;
  height: number;
  /** Of its middle; null unless it was asked for and could be measured. */
  lab: Lab | null;
};

const MOST_AT_ONCE = 2;
const LARGE_QUALITY = 82;
const THUMB_QUALITY = 76;
const PAPER = "#ffffff";

// The weigh-ins of others go on meanwhile, on the same two cores; nothing is asked for twice.
sharp.concurrency(1);
sharp.cache(false);

let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= MOST_AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  else running += 1;
  try {
    return await work();
  } finally {
    // The place goes straight to the next one, so nobody can slip in between.
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

async function decode(bytes: Buffer): Promise<Buffer> {
  const source = sharp(bytes, { failOn: "error", limitInputPixels: MOST_PHOTO_PIXELS, pages: 1 });
  return source
    .autoOrient()
    .resize(LARGE_EDGE_PIXELS, LARGE_EDGE_PIXELS, { fit: "inside", withoutEnlargement: true })
    .flatten({ background: PAPER })
    .toColourspace("srgb")
    .jpeg({ quality: LARGE_QUALITY, mozjpeg: true })
    .toBuffer();
}

async function measure(large: Buffer): Promise<Lab | null> {
  const { data, info } = await sharp(large)
    .resize(THUMB_EDGE_PIXELS, THUMB_EDGE_PIXELS, { fit: "inside", withoutEnlargement: true })
    .raw()
    .toBuffer({ resolveWithObject: true });
  return middleColour(data, info.width, info.height, info.channels === 1 ? 1 : 3);
}

async function make(bytes: Buffer, withColour: boolean): Promise<Picture> {
  const header = await sharp(bytes, { limitInputPixels: false }).metadata();
  if (header.width * header.height > MOST_PHOTO_PIXELS) throw new AppError("photo-too-large");
  const large = await decode(bytes);
  const { data: thumb } = await sharp(large)
    .resize(THUMB_EDGE_PIXELS, THUMB_EDGE_PIXELS, { fit: "inside", withoutEnlargement: true })
    .jpeg({ quality: THUMB_QUALITY, mozjpeg: true })
    .toBuffer({ resolveWithObject: true });
  const { width, height } = await sharp(large).metadata();
  return { large, thumb, width, height, lab: withColour ? await measure(large) : null };
}

/**
 * Makes what is kept of a picture: JPEG in sRGB, upright, longer edges of 1600 and 320 px at most, without any
 * metadata, transparency on white.
 *
 * @param bytes the file as it was sent
 * @param withColour measure the middle's colour too
 * @throws AppError `photo-heic`, `photo-not-a-picture` (also one that ends too soon), `photo-too-large`
 */
export async function makePicture(bytes: Buffer, withColour: boolean): Promise<Picture> {
  // Before the decoder sees it: it knows more forms than are wanted here, SVG among them.
  const kind = pictureKind(bytes);
  if (kind === "heic") throw new AppError("photo-heic");
  if (kind === null) throw new AppError("photo-not-a-picture");
  return inTurn(async () => {
    try {
      return await make(bytes, withColour);
    } catch (error) {
      if (error instanceof AppError) throw error;
      // The decoder's words are about its insides; to the sender it is no picture that can be read.
      throw new AppError("photo-not-a-picture");
    }
  });
}
