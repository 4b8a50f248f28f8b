/**
 * Invariant: every number that was read off a scale counts once in what a sum of readings can tell: the gross, and
 * each tare that is on the list, because it was read on a scale too. A tare that was typed in is taken as told.
 */
import type { Reading } from "./reading";
import { combinedTolerance, mpeInService, type ScaleSpec } from "./scale";

/** A load in whole milligrams, and the scale on which it was read. */
export type Load = { loadMilligrams: number; scale: ScaleSpec };

/** The readings of a scale behind one weighing. This scale's error stands for that of a listed tare. */
export function loadsOf(reading: Reading, scale: ScaleSpec): Load[] {
  const loads = [reading.grossMilligrams];
  if (reading.containerId !== null) loads.push(reading.containerTareMilligrams);
  if (reading.sackId !== null) loads.push(reading.sackTareMilligrams);
  return loads.map((loadMilligrams) => ({ loadMilligrams, scale }));
}

/**
 * How far sums of these loads may lie apart: 2 u over all of them (JCGM 100, rectangular), not less than the
 * largest display step. Whole milligrams.
 */
export function toleranceOf(loads: readonly Load[]): number {
  return combinedTolerance(
    loads.map((load) => mpeInService(load.scale, load.loadMilligrams)),
    loads.reduce((largest, load) => Math.max(largest, load.scale.dMilligrams), 0),
  );
}
