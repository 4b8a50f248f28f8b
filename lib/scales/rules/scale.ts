/**
 * Invariant: what a scale can tell is said in whole milligrams. A reading is at most Max and a whole number of
 * display steps d; its largest permitted error in service, and from errors the tolerance of a sum, follow
 * the published tables and never depend on who asks.
 */
import type { ErrorDetail } from "@/lib/core/errors";
import { formatStep } from "@/lib/core/mass";
import type { ScaleData } from "../contract/scales";
import type { ScaleClass } from "../terms";

/** What the rules need to know of a scale. Loads in whole milligrams. */
export type ScaleSpec = {
  class: ScaleClass;
  maxMilligrams: number;
  /** Verification scale interval e; null for a scale that is not verified. */
  eMilligrams: number | null;
  /** Display step d. */
  dMilligrams: number;
  /** ± accuracy that the maker states; null for a verified scale. */
  statedAccuracyMilligrams: number | null;
};

type VerifiedClass = Exclude<ScaleClass, "none">;

/**
 * Maximum permissible errors on initial verification, OIML R 76-1:2006 Table 6, as read in UK SI 1995/1907
 * Schedule 2 paragraph 4 Table 3: up to so many e (inclusive), so many halves of e.
 */
const MPE_BANDS: Record<VerifiedClass, readonly { upToE: number; halvesOfE: 1 | 2 | 3 }[]> = {
  III: [
    { upToE: 500, halvesOfE: 1 },
    { upToE: 2_000, halvesOfE: 2 },
    { upToE: 10_000, halvesOfE: 3 },
  ],
  IIII: [
    { upToE: 50, halvesOfE: 1 },
    { upToE: 200, halvesOfE: 2 },
    { upToE: 1_000, halvesOfE: 3 },
  ],
};

/** In service the errors may be twice those of initial verification (SI 1995/1907 Sch. 2 para 4.2). */
const IN_SERVICE = 2;

/** Smallest load, in e, on which the relative error is still small (OIML R 76-1 Table 3). */
const MINIMUM_IN_E: Record<VerifiedClass, number> = { III: 20, IIII: 10 };

/**
 * Number of intervals n = Max / e that a class allows, by the smallest e (OIML R 76-1 Table 3,
 * read in a secondary source). Ordered from the largest e down.
 */
const INTERVALS: Record<
  VerifiedClass,
  readonly { fromEMilligrams: number; least: number; most: number }[]
> = {
  III: [
    { fromEMilligrams: 5_000, least: 500, most: 10_000 },
    { fromEMilligrams: 100, least: 100, most: 10_000 },
  ],
  IIII: [{ fromEMilligrams: 5_000, least: 100, most: 1_000 }],
};

/** Largest multiple of d that e may be (OIML R 76-1 3.4.2, from memory; scales of class III mostly have e = d). */
const MOST_D_IN_E = 10;

/**
 * The error that a reading on this scale may have in service: ± whole milligrams.
 *
 * Verified: OIML R 76-1 Table 6, doubled, by the load in e; twice 0.5 e, 1 e or 1.5 e is a whole number of
 * e, so nothing is rounded. Above the table's last band the last band holds (such a load is above Max
 * and refused elsewhere). Not verified: what the maker states, at any load.
 *
 * @param loadMilligrams load on the receptor, zero or more
 */
export function mpeInService(scale: ScaleSpec, loadMilligrams: number): number {
  if (scale.class === "none") return scale.statedAccuracyMilligrams ?? scale.dMilligrams;
  const e = scale.eMilligrams ?? scale.dMilligrams;
  const bands = MPE_BANDS[scale.class];
  const band = bands.find(({ upToE }) => loadMilligrams <= upToE * e) ?? bands[bands.length - 1];
  return ((band?.halvesOfE ?? 3) * e * IN_SERVICE) / 2;
}

/** Readings below it are accepted and marked: 20 e (III), 10 e (IIII) in milligrams; 0 when not verified. */
export function minimumCapacity(scale: ScaleSpec): number {
  if (scale.class === "none") return 0;
  return MINIMUM_IN_E[scale.class] * (scale.eMilligrams ?? scale.dMilligrams);
}

/** `below-minimum` is accepted and marked; the two others are refused. */
export type ReadingVerdict = "fine" | "below-minimum" | "above-max" | "not-a-step";

/** Can this scale have shown this reading? */
export function checkReading(scale: ScaleSpec, readingMilligrams: number): ReadingVerdict {
  if (readingMilligrams > scale.maxMilligrams) return "above-max";
  if (readingMilligrams % scale.dMilligrams !== 0) return "not-a-step";
  return readingMilligrams < minimumCapacity(scale) ? "below-minimum" : "fine";
}

/**
 * How far the sum of readings may be off: 2 u, where each reading has the standard uncertainty u = MPE / √3
 * (JCGM 100:2008 4.3.7, rectangular) and they combine as the root of the sum of squares; not less than one
 * display step. A listed tare is a reading too.
 *
 * Exact in integers, rounded up to the next whole milligram, so that a difference of just the tolerance
 * is within it.
 *
 * @param mpesMilligrams the errors of the readings, each zero or more
 * @param displayStepMilligrams the largest d among the scales used
 */
export function combinedTolerance(
  mpesMilligrams: readonly number[],
  displayStepMilligrams: number,
): number {
  let squares = 0n;
  for (const mpe of mpesMilligrams) squares += BigInt(mpe) * BigInt(mpe);
  // 2·√(Σ mpe² / 3) = √(4 Σ mpe² / 3): the smallest whole t with 3 t² ≥ 4 Σ mpe².
  const wanted = 4n * squares;
  let tolerance = BigInt(Math.floor(Math.sqrt(Number(wanted) / 3)));
  while (3n * tolerance * tolerance < wanted) tolerance += 1n;
  while (tolerance > 0n && 3n * (tolerance - 1n) * (tolerance - 1n) >= wanted) tolerance -= 1n;
  return Math.max(Number(tolerance), displayStepMilligrams);
}

/** What cannot be right in a scale's data, with the values that its sentence needs. */
export type ScaleProblem =
  | { code: "scale-step"; field: "dMilligrams" }
  | { code: "scale-interval"; field: "eMilligrams"; class: VerifiedClass; leastMilligrams: number }
  | { code: "scale-max"; field: "maxMilligrams"; stepMilligrams: number }
  | {
      code: "scale-intervals";
      field: "maxMilligrams";
      class: VerifiedClass;
      /** floor(Max / e) */
      count: number;
      least: number;
      most: number;
    };

/**
 * Checks what was read off a scale's plate: d is 1, 2 or 5 times a power of ten; Max is a whole number of
 * d; d ≤ e ≤ 10 d, e is not below the class's least, and Max / e lies in the class's range (OIML R 76-1 Table 3).
 *
 * @returns the first thing that cannot be right, or null
 */
export function checkScale(scale: ScaleSpec): ScaleProblem | null {
  const { maxMilligrams: max, eMilligrams: e, dMilligrams: d } = scale;
  if (!isStep(d)) return { code: "scale-step", field: "dMilligrams" };
  if (max < d || max % d !== 0) {
    return { code: "scale-max", field: "maxMilligrams", stepMilligrams: d };
  }
  if (scale.class === "none" || e === null) return null;
  const ranges = INTERVALS[scale.class];
  const range = ranges.find(({ fromEMilligrams }) => e >= fromEMilligrams);
  if (!range || !isStep(e) || e < d || e > MOST_D_IN_E * d) {
    const leastMilligrams = Math.min(...ranges.map(({ fromEMilligrams }) => fromEMilligrams));
    return { code: "scale-interval", field: "eMilligrams", class: scale.class, leastMilligrams };
  }
  if (max < range.least * e || max > range.most * e) {
    const { least, most } = range;
    const count = Math.floor(max / e);
    return {
      code: "scale-intervals",
      field: "maxMilligrams",
      class: scale.class,
      count,
      least,
      most,
    };
  }
  return null;
}

/** What the sentence of a problem needs. */
export function problemValues(problem: ScaleProblem): ErrorDetail {
  switch (problem.code) {
    case "scale-step":
      return {};
    case "scale-max":
      return { step: formatStep(problem.stepMilligrams) };
    case "scale-interval":
      return { class: problem.class, least: formatStep(problem.leastMilligrams) };
    case "scale-intervals":
      return {
        class: problem.class,
        count: problem.count,
        least: problem.least,
        most: problem.most,
      };
  }
}

/** The rules' view of what a form or request says of a scale. */
export function specOf(data: ScaleData): ScaleSpec {
  const { maxMilligrams, dMilligrams } = data;
  return data.class === "none"
    ? {
        class: data.class,
        maxMilligrams,
        dMilligrams,
        eMilligrams: null,
        statedAccuracyMilligrams: data.statedAccuracyMilligrams,
      }
    : {
        class: data.class,
        maxMilligrams,
        dMilligrams,
        eMilligrams: data.eMilligrams,
        statedAccuracyMilligrams: null,
      };
}

/** 1, 2 or 5 times a power of ten, in whole milligrams. */
function isStep(milligrams: number): boolean {
  if (!Number.isSafeInteger(milligrams) || milligrams < 1) return false;
  let rest = milligrams;
  while (rest % 10 === 0) rest /= 10;
  return rest === 1 || rest === 2 || rest === 5;
}
