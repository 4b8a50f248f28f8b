/**
 * Invariant: wherever heat or blades are planned, the set-point stands beside the polymer's ceiling and the cautions beside
 * the work; none of them asks for a tick. Cautions: common practice, no source.
 */
import type { Machine } from "../contract/catalogue";
import { REFERENCE } from "./reference";
import type { Heatable, Method } from "../terms";

const HEAT = [
  "Ventilate, and extract fumes where they arise.",
  "Heat-proof gloves and eye protection.",
  "Never heat PVC, nor anything that nobody could identify.",
  "No food contact without authorisation.",
  "Flakes and dust are collected and not washed away.",
] as const;
const BLADES = [
  "Eye protection, and extraction at the saw. No loose sleeves or gloves near the blade.",
  "Switch off and lock out before cleaning. Never reach in.",
  "Cuttings and dust are collected and not washed away.",
] as const;

/** Of a workshop with presses, barrels and saws, whatever is made. */
export const WORKSHOP_CAUTIONS: readonly string[] = [
  ...HEAT.slice(0, -1),
  "Dry PET first. Never above a polymer's ceiling: there it gives off fumes and breaks down.",
  ...BLADES,
];

/** The temperature line, where heat is used, and the cautions of a method. */
export function cautionsFor(
  method: Method,
  polymer: Heatable,
  machine: Pick<Machine, "setPoints"> | null,
): { temperature: string | null; lines: string[] } {
  if (method === "cutting") return { temperature: null, lines: [...BLADES] };
  const ceiling = REFERENCE[polymer].ceilingCelsius;
  const own = machine?.setPoints.find((point) => point.polymer === polymer);
  return {
    temperature: own
      ? `set ${own.celsius} °C on this machine, never above ${ceiling} °C.`
      : `no temperature is set here, never above ${ceiling} °C.`,
    lines: polymer === "PET" ? ["Dry PET fully before it is heated.", ...HEAT] : [...HEAT],
  };
}
