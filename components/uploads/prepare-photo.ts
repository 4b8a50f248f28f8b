/**
 * Makes of a chosen file what is sent: a JPEG of at most {@link LARGE_EDGE_PIXELS}, drawn anew, so that nothing
 * of what the camera wrote beside the picture (place, time, device) leaves this phone.
 */
import { middleColour, type Lab } from "@/lib/core/colour";
import type { PhotoCode } from "@/lib/core/photo-messages";
import { pictureKind } from "@/lib/uploads/rules/content";
import { LARGE_EDGE_PIXELS, MOST_PHOTO_BYTES } from "@/lib/uploads/terms";

export type PreparedPhoto = {
  blob: Blob;
  width: number;
  height: number;
  /** Colour of its middle; null when it shows none. */
  middle: Lab | null;
};

export type Preparing = { ok: true; photo: PreparedPhoto } | { ok: false; code: PhotoCode };

/** A file that is larger is no photo of a bag, and decoding it could end the page. */
const LARGEST_FILE_BYTES = 60 * 1024 * 1024;
const QUALITY = 0.82;
/** Longer edge of the small picture that the colour is measured in: large enough to be fair, small to be quick. */
const MEASURED_EDGE = 256;

/** Width and height scaled down so that the longer edge is at most `edge`; never up. */
export function fitted(
  width: number,
  height: number,
  edge: number,
): { width: number; height: number } {
  const scale = Math.min(1, edge / Math.max(width, height));
  return {
    width: Math.max(1, Math.round(width * scale)),
    height: Math.max(1, Math.round(height * scale)),
  };
}

/** Why the browser could not read a file, told by its first bytes and not by its name. */
async function undecodable(file: Blob): Promise<PhotoCode> {
  const start = new Uint8Array(await file.slice(0, 32).arrayBuffer());
  return pictureKind(start) === "heic" ? "photo-heic" : "photo-not-a-picture";
}

function draw(
  picture: ImageBitmap,
  size: { width: number; height: number },
  ground: string | null,
): { canvas: HTMLCanvasElement; context: CanvasRenderingContext2D } | null {
  const canvas = document.createElement("canvas");
  canvas.width = size.width;
  canvas.height = size.height;
  const context = canvas.getContext("2d", { willReadFrequently: ground === null });
  if (!context) return null;
  if (ground !== null) {
    // A JPEG has no transparency; without a ground its clear parts would turn black.
    context.fillStyle = ground;
    context.fillRect(0, 0, size.width, size.height);
  }
  context.imageSmoothingQuality = "high";
  context.drawImage(picture, 0, 0, size.width, size.height);
  return { canvas, context };
}

const asJpeg = (canvas: HTMLCanvasElement): Promise<Blob | null> =>
  new Promise((resolve) => canvas.toBlob(resolve, "image/jpeg", QUALITY));

/** Reads, turns upright, scales and writes one picture anew. Never throws. */
export async function preparePhoto(file: Blob): Promise<Preparing> {
  if (file.size === 0) return { ok: false, code: "photo-empty" };
  if (file.size > LARGEST_FILE_BYTES) return { ok: false, code: "photo-too-large" };
  let picture: ImageBitmap;
  try {
    picture = await createImageBitmap(file, { imageOrientation: "from-image" });
  } catch {
    return { ok: false, code: await undecodable(file).catch(() => "photo-empty" as const) };
  }
  try {
    const size = fitted(picture.width, picture.height, LARGE_EDGE_PIXELS);
    const large = draw(picture, size, "#ffffff");
    const blob = large && (await asJpeg(large.canvas));
    if (!blob || blob.size > MOST_PHOTO_BYTES) return { ok: false, code: "photo-too-large" };
    return { ok: true, photo: { blob, ...size, middle: measured(picture) } };
  } finally {
    picture.close();
  }
}

function measured(picture: ImageBitmap): Lab | null {
  const size = fitted(picture.width, picture.height, MEASURED_EDGE);
  const small = draw(picture, size, null);
  if (!small) return null;
  const { data } = small.context.getImageData(0, 0, size.width, size.height);
  return middleColour(data, size.width, size.height, 4);
}

/** Colour of the middle of a picture that is not sent anywhere. */
export async function colourOfPicture(
  file: Blob,
): Promise<{ ok: true; lab: Lab | null } | { ok: false; code: PhotoCode }> {
  if (file.size === 0) return { ok: false, code: "photo-empty" };
  if (file.size > LARGEST_FILE_BYTES) return { ok: false, code: "photo-too-large" };
  try {
    const picture = await createImageBitmap(file, { imageOrientation: "from-image" });
    const lab = measured(picture);
    picture.close();
    return { ok: true, lab };
  } catch {
    return { ok: false, code: await undecodable(file).catch(() => "photo-empty" as const) };
  }
}
