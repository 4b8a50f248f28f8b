/**
 * Invariant: what a plastic does in water follows from its published density: under 1.00 g/cm³ it floats, above it
 * sinks. The ranges are the widest that the sources in fixtures/reference/densities.csv give (web handbooks, not limits
 * of a standard); tests/reference compares them.
 */
import type { Polymer } from "@/lib/core/plastics";

export type FloatRow = {
  polymer: Polymer;
  /** g/cm³, as hundredths or thousandths print. */
  least: number;
  most: number;
};

/** Lightest first. */
export const DENSITIES: readonly FloatRow[] = [
  { polymer: "PP", least: 0.89, most: 0.92 },
  { polymer: "PE-LD", least: 0.91, most: 0.94 },
  { polymer: "PE-HD", least: 0.94, most: 0.97 },
  { polymer: "PS", least: 1.03, most: 1.06 },
  { polymer: "ABS", least: 1.02, most: 1.21 },
  { polymer: "PA", least: 1.13, most: 1.16 },
  { polymer: "PC", least: 1.2, most: 1.22 },
  { polymer: "PLA", least: 1.25, most: 1.25 },
  { polymer: "PET", least: 1.29, most: 1.4 },
  { polymer: "PVC", least: 1.18, most: 1.58 },
];

/** Fresh water at room temperature, g/cm³. */
export const WATER = 1;

export function floats({ most }: FloatRow): boolean {
  return most < WATER;
}
