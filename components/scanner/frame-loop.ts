/** Takes frames from a running video and has them read, one at a time, for as long as it runs. */

/** Long edge of what is read. A tag that fills a tenth of it still has two pixels a module. */
const MOST_PX = 960;
/** Between the end of one reading and the next: ten a second are plenty, and a phone stays cool. */
const REST_MS = 60;
/** Without requestVideoFrameCallback: how often it is looked whether there is a picture. */
const LOOK_MS = 100;

/** Where a canvas's pixels are read back on every frame. */
export function canvasOf(width: number, height: number): HTMLCanvasElement {
  const canvas = document.createElement("canvas");
  canvas.width = width;
  canvas.height = height;
  return canvas;
}

/** Draws a picture so that its long edge is at most `mostPx`, on a canvas that is kept. */
export function drawScaled(
  canvas: HTMLCanvasElement,
  source: CanvasImageSource,
  size: { width: number; height: number },
  mostPx: number,
): void {
  const scale = Math.min(1, mostPx / Math.max(size.width, size.height));
  const width = Math.max(1, Math.round(size.width * scale));
  const height = Math.max(1, Math.round(size.height * scale));
  if (canvas.width !== width) canvas.width = width;
  if (canvas.height !== height) canvas.height = height;
  canvas.getContext("2d", { willReadFrequently: true })?.drawImage(source, 0, 0, width, height);
}

type Video = Pick<HTMLVideoElement, "videoWidth" | "videoHeight" | "readyState"> &
  Partial<Pick<HTMLVideoElement, "requestVideoFrameCallback" | "cancelVideoFrameCallback">>;

/**
 * Runs until stopped: waits for a frame, draws it, has it read, rests.
 *
 * @param draw puts the frame where `read` finds it
 * @param read reads it; when it throws the loop goes on, because the reader is replaced outside
 * @returns ends the loop; a reading under way is not waited for, and nothing is begun after it
 */
export function startFrameLoop(
  video: Video,
  draw: () => void,
  read: () => Promise<void>,
): () => void {
  let running = true;
  let handle: number | undefined;
  let timer: ReturnType<typeof setTimeout> | undefined;

  const next = (): void => {
    if (!running) return;
    if (video.requestVideoFrameCallback) {
      handle = video.requestVideoFrameCallback(() => void take());
    } else timer = setTimeout(() => void take(), LOOK_MS);
  };

  const take = async (): Promise<void> => {
    // HAVE_CURRENT_DATA; some cameras announce themselves with a picture of 2 by 2 pixels first.
    if (video.readyState >= 2 && video.videoWidth > 16) {
      draw();
      await read().catch(() => undefined);
    }
    if (running) timer = setTimeout(next, REST_MS);
  };

  next();
  return () => {
    running = false;
    clearTimeout(timer);
    if (handle !== undefined) video.cancelVideoFrameCallback?.(handle);
  };
}

/** Draws a video's frame for the reader. */
export function drawFrame(canvas: HTMLCanvasElement, video: HTMLVideoElement): void {
  drawScaled(canvas, video, { width: video.videoWidth, height: video.videoHeight }, MOST_PX);
}
