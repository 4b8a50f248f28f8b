/**
 * What is tried on a picture, cheapest and most rewarding first: as it is, then evened out, thresholded, enlarged,
 * sharpened, stretched. The order is that of the gain for the time on the corpus (`npm run bench scan-corpus`).
 * A text is only ever what the decoder's error correction vouches for; no pass guesses.
 */
import { readScan } from "@/lib/core/bag-code";
import type { Effort } from "../scan-engine";
import type { Decoder, DecodeOptions, Found } from "./decoder";
import { mended } from "./finders";
import {
  againstPaper,
  cropped,
  darkest,
  levelled,
  resized,
  sharpened,
  stretched,
  thresholded,
  type Grey,
} from "./grey";

const AS_IS: DecodeOptions = { binarizer: "LocalAverage", harder: true };
/** For pictures that are black and white already. */
const CUT: DecodeOptions = { binarizer: "FixedThreshold", harder: true };
const CUT_CLOSED: DecodeOptions = { ...CUT, closing: true };

/** What a live frame may cost beyond its first look, in ms; one more pass is always tried. */
const LIVE_MS = 45;
/** How many further passes a glance has. */
const GLANCE = 3;
/** Enlarged pictures beyond this are cut to their middle, where a person holds the tag. */
const MOST_PIXELS = 1_400_000;

type Pass = (grey: Grey, decode: Decoder) => Found[];

/** Reaches are for a picture 640 px long, in which a tag held well has modules of 5 px. */
const scaled = (grey: Grey, reach: number): number =>
  Math.max(reach, Math.round((reach * Math.max(grey.width, grey.height)) / 640));

function enlarged(grey: Grey, factor: number): Grey {
  const most = MOST_PIXELS / (factor * factor);
  const share = Math.min(1, Math.sqrt(most / (grey.width * grey.height)));
  if (share === 1) return resized(grey, factor);
  const [x, y] = [(grey.width * (1 - share)) / 2, (grey.height * (1 - share)) / 2];
  return resized(cropped(grey, x, y, grey.width - x, grey.height - y), factor);
}

const cut =
  (reach: number, bias: number): Pass =>
  (grey, decode) =>
    decode(thresholded(grey, scaled(grey, reach), bias), CUT);

/** Looked at from the side by up to 60 degrees, about an axis at this angle. */
const fromTheSide =
  (degrees: number): Pass =>
  (grey, decode) =>
    decode(stretched(grey, (degrees * Math.PI) / 180, 1.6), AS_IS);

/** Every frame has this one. */
const FIRST: Pass = (grey, decode) => decode(grey, AS_IS);

const REST: readonly Pass[] = [
  cut(12, 4),
  // Dirt is dark and ink is darker; a splash or a reflection on a corner's square hides the whole symbol.
  (grey, decode) => decodeMended(darkest(grey), decode),
  (grey, decode) => decode(levelled(grey, scaled(grey, 12), 6), CUT),
  (grey, decode) => decodeMended(thresholded(grey, scaled(grey, 12), 4), decode),
  cut(8, 4),
  (grey, decode) => decode(enlarged(grey, 2), AS_IS),
  // Blur: what the lens spread is gathered again before it is cut.
  (grey, decode) =>
    decode(thresholded(sharpened(grey, scaled(grey, 4), 2), scaled(grey, 24), 2), CUT),
  fromTheSide(90),
  (grey, decode) => decode(levelled(grey, scaled(grey, 12), 6), CUT_CLOSED),
  fromTheSide(0),
  (grey, decode) => decode(sharpened(enlarged(grey, 3), 6, 2), AS_IS),
  fromTheSide(45),
  fromTheSide(135),
  (grey, decode) => decode(sharpened(enlarged(grey, 2), 5, 2), AS_IS),
  cut(6, 4),
  // Glare: in its rim even ink is brighter than paper elsewhere.
  (grey, decode) => decode(againstPaper(grey, scaled(grey, 12), 0.92), CUT),
  (grey, decode) => decode(grey, { ...AS_IS, inverted: true }),
];

function decodeMended(cutPicture: Grey, decode: Decoder): Found[] {
  const grey = mended(cutPicture);
  return grey ? decode(grey, CUT) : [];
}

/** One of ours before anybody else's; what was only found is nothing. */
function textOf(found: readonly Found[]): string | null {
  const texts = found.flatMap(({ text }) => (text === null ? [] : [text]));
  return texts.find((text) => readScan(text) !== null) ?? texts[0] ?? null;
}

/**
 * Makes the reader of pictures. A live frame gets the first pass and as many others as its time allows; the
 * next frame goes on with those after them, so that a tag held still gets all of them within a second or two.
 * A photo gets all at once.
 *
 * @param now milliseconds of a clock that only goes forward
 */
export function passReader(
  decode: Decoder,
  now: () => number,
): (grey: Grey, effort: Effort) => string | null {
  let turn = 0;
  return (grey, effort) => {
    const started = now();
    const text = textOf(FIRST(grey, decode));
    if (text !== null) return text;
    for (let tried = 0; tried < REST.length; tried += 1) {
      if (effort === "glance" && tried >= GLANCE) break;
      if (effort === "live" && tried > 0 && now() - started > LIVE_MS) break;
      const pass = REST[effort === "live" ? turn : tried];
      if (effort === "live") turn = (turn + 1) % REST.length;
      const more = pass ? textOf(pass(grey, decode)) : null;
      if (more !== null) return more;
    }
    return null;
  };
}
