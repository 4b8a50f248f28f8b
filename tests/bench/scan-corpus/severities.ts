/**
 * What is done to the pictures, and how much of it. Set from what a shed does to a label, before any decoder
 * had seen a picture, so that the table compares decoders and not settings. Once lowered since: hard blur, and every level of glare
 * and wet wrinkles, of which no decoder at all had read a single picture, so that their rows told nothing.
 */
export const SEVERITIES = {
  /** Out of focus: deviation of the Gaussian, in modules of the symbol. */
  blur: [0.35, 0.55, 0.65],
  /** A moving hand: length of the stroke in modules. */
  motion: [1, 1.6, 2.2],
  /** Turned in the picture, degrees at most. */
  rotation: [15, 45, 180],
  /** Looked at from the side, degrees off the normal. */
  perspective: [35, 50, 60],
  /** Share of a good exposure; the rest is made up by gain, with its noise. */
  "low light": [0.16, 0.08, 0.04],
  /** A lamp's reflection: share of the symbol's area that is washed out. */
  glare: [0.06, 0.1, 0.15],
  /** Deviation of each pixel, of 255. */
  noise: [20, 36, 54],
  /** Difference between ink and paper, of full. */
  "low contrast": [0.25, 0.12, 0.06],
  /** How far a wet, wrinkled label moves its modules, in modules. */
  "wet wrinkles": [0.3, 0.5, 0.75],
  /** Share of the symbol's area under dirt. */
  dirt: [0.06, 0.12, 0.18],
  /** Pixels for a module. */
  small: [2.6, 2, 1.5],
  /** Quality of the JPEG. */
  jpeg: [18, 9, 4],
} as const satisfies Record<string, readonly [number, number, number]>;

export type Kind = keyof typeof SEVERITIES;
export const KINDS = Object.keys(SEVERITIES) as Kind[];
export type Severity = 0 | 1 | 2;
export const SEVERITY_NAMES = ["mild", "middle", "hard"] as const;
