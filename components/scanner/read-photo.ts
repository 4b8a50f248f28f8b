/** A photo of a tag, taken with the phone's own camera or sent by somebody: read as it is, then smaller. */
import { canvasOf, drawScaled } from "./frame-loop";
import type { Effort } from "./scan-engine";

/** As much as phones let a canvas be (16.7 million pixels on iOS). */
const MOST_PX = 4096;
/**
 * Sizes that everything is tried at: the larger first, which reads most photos in a fraction of the full one's
 * time; the smaller because a tag that fills a photo has modules of 50 pixels, which engines do not see as such.
 */
const WHOLE_PX = [1400, 700] as const;

type Try = { edge: number; effort: Effort };

/** @throws Error when the file is no picture that the browser can show */
export async function readPhoto(
  file: Blob,
  decode: (picture: HTMLCanvasElement, effort: Effort) => Promise<string | null>,
): Promise<string | null> {
  const picture = await createImageBitmap(file, { imageOrientation: "from-image" });
  try {
    const longEdge = Math.max(picture.width, picture.height);
    const edges = new Set(WHOLE_PX.map((px) => Math.min(px, longEdge)));
    const tries = [...edges].map((edge): Try => ({ edge, effort: "photo" }));
    // A tag that is small in a large photo is there in all its pixels only.
    if (longEdge > WHOLE_PX[0]) {
      tries.push({ edge: Math.min(MOST_PX, longEdge), effort: "glance" });
    }
    const canvas = canvasOf(1, 1);
    for (const { edge, effort } of tries) {
      drawScaled(canvas, picture, picture, edge);
      const text = await decode(canvas, effort);
      if (text !== null) return text;
    }
    return null;
  } finally {
    picture.close();
  }
}
