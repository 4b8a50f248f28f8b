/**
 * Invariant: a check weight passes when the scale's error is within what its class allows in service at that load,
 * and a scale stands on a day as its last check left it, unless a lead said otherwise.
 */
import type { ScaleDayState } from "../terms";
import { mpeInService, type ScaleSpec } from "./scale";

export type CheckVerdict = {
  /** Reading less mass: above zero the scale shows too much. */
  errorMilligrams: number;
  limitMilligrams: number;
  passed: boolean;
};

/**
 * Judges a reading of a known mass: |reading − mass| ≤ MPE in service at that load (OIML R 76-1 Table 6, doubled). The
 * weight's own error is taken as none, because it was weighed on a verified scale or is certified.
 */
export function judgeCheck(
  scale: ScaleSpec,
  massMilligrams: number,
  readingMilligrams: number,
): CheckVerdict {
  const errorMilligrams = readingMilligrams - massMilligrams;
  const limitMilligrams = mpeInService(scale, massMilligrams);
  return { errorMilligrams, limitMilligrams, passed: Math.abs(errorMilligrams) <= limitMilligrams };
}

/** Failures in a row after which nothing but a lead's word helps: a check may be repeated once. */
const MOST_FAILURES = 2;

/**
 * How a scale stands on a day.
 *
 * @param passed the day's checks in their order
 * @param cleared a lead cleared it for that day
 */
export function dayState(passed: readonly boolean[], cleared: boolean): ScaleDayState {
  if (cleared) return "cleared";
  if (passed.length === 0) return "not-checked";
  const failures = passed.length - 1 - passed.lastIndexOf(true);
  if (failures === 0) return "confirmed";
  return failures < MOST_FAILURES ? "failed-once" : "failed";
}
