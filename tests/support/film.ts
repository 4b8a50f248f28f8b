/** Films for Chromium's fake camera: still pictures, each held in front of the lens for a while. */
import fs from "node:fs";
import type { GreyImage } from "./scan-sheets";

const WIDTH = 640;
const HEIGHT = 480;
const FRAMES = 30;
/** The table on which the label lies. */
const TABLE = 190;

/** Draws the picture into the middle of a frame, as large as fits with a margin; nearest pixel. */
function frameOf(picture: GreyImage): Buffer {
  const frame = Buffer.alloc(WIDTH * HEIGHT, TABLE);
  const scale = Math.min((WIDTH - 80) / picture.width, (HEIGHT - 80) / picture.height);
  const [wide, high] = [Math.floor(picture.width * scale), Math.floor(picture.height * scale)];
  const [left, top] = [Math.floor((WIDTH - wide) / 2), Math.floor((HEIGHT - high) / 2)];
  for (let row = 0; row < high; row += 1) {
    const from = Math.min(picture.height - 1, Math.floor(row / scale)) * picture.width;
    for (let column = 0; column < wide; column += 1) {
      const grey =
        picture.pixels[from + Math.min(picture.width - 1, Math.floor(column / scale))] ?? 255;
      frame[(top + row) * WIDTH + left + column] = grey;
    }
  }
  return frame;
}

/** Writes a YUV4MPEG2 film of a grey picture; Chromium loops it. */
export function writeFilm(file: string, picture: GreyImage): void {
  writeFilmOf(file, [picture], FRAMES, 30);
}

/** Of several pictures, one after the other for `framesEach` frames each; Chromium loops it. */
export function writeFilmOf(
  file: string,
  pictures: readonly GreyImage[],
  framesEach: number,
  framesPerSecond: number,
): void {
  const colourless = Buffer.alloc((WIDTH * HEIGHT) / 2, 128);
  const out = fs.openSync(file, "w");
  fs.writeSync(out, `YUV4MPEG2 W${WIDTH} H${HEIGHT} F${framesPerSecond}:1 Ip A1:1 C420jpeg\n`);
  for (const picture of pictures) {
    const frame = frameOf(picture);
    for (let count = 0; count < framesEach; count += 1) {
      fs.writeSync(out, "FRAME\n");
      fs.writeSync(out, frame);
      fs.writeSync(out, colourless);
    }
  }
  fs.closeSync(out);
}
