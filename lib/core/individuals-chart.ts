/**
 * Individuals and moving-range chart: the usual range of a figure that comes one at a time.
 *
 * Invariant: limits follow from the figures alone and are the same in whatever unit they are written.
 */

/** Expected range of two readings in standard deviations (NIST/SEMATECH e-Handbook 6.3.2.2). */
const D2_OF_TWO = 1.128;
/** Upper limit of a moving range of two, in mean ranges (NIST/SEMATECH e-Handbook 6.3.2.2). */
const D4_OF_TWO = 3.267;

export type IndividualsChart = {
  mean: number;
  /** Mean of the ranges between neighbours. */
  meanRange: number;
  lower: number;
  upper: number;
  /** A step from one figure to the next above it is unusual. */
  rangeUpper: number;
};

/**
 * Mean ± 3 / 1.128 (that is 2.66) times the mean moving range (NIST/SEMATECH e-Handbook of Statistical Methods 6.3.2.2).
 *
 * @param figures in the order in which they came
 * @returns null for fewer than two figures, which have no range
 */
export function individualsChart(figures: readonly number[]): IndividualsChart | null {
  if (figures.length < 2) return null;
  const mean = figures.reduce((sum, figure) => sum + figure, 0) / figures.length;
  let ranges = 0;
  figures.forEach((figure, at) => {
    const before = figures[at - 1];
    if (before !== undefined) ranges += Math.abs(figure - before);
  });
  const meanRange = ranges / (figures.length - 1);
  const spread = (3 / D2_OF_TWO) * meanRange;
  return {
    mean,
    meanRange,
    lower: mean - spread,
    upper: mean + spread,
    rangeUpper: D4_OF_TWO * meanRange,
  };
}
