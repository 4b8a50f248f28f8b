/** Closed lists of the workshop: how pieces are made, and what a run can be. */
import type { Form, Polymer, WashState } from "../core/plastics";

export const METHODS = ["pressing", "moulding", "cutting"] as const;
export type Method = (typeof METHODS)[number];
export const METHOD_NAMES: Record<Method, string> = {
  pressing: "Pressing",
  moulding: "Moulding",
  cutting: "Cutting",
};
/** "pressed", "moulded", "cut": after the count of pieces in a run's title. */
export const MADE_BY: Record<Method, string> = {
  pressing: "pressed",
  moulding: "moulded",
  cutting: "cut",
};

/** What a method takes (product.md, "Reservations and runs"). */
export const METHOD_FORMS: Record<Method, readonly Form[]> = {
  pressing: ["whole", "flake", "sheet", "offcut"],
  moulding: ["flake"],
  cutting: ["sheet"],
};
/** Moulding takes dry flake only; a press and a saw do not mind the water of a wash. */
export const METHOD_WASH: Record<Method, readonly WashState[]> = {
  pressing: ["as-received", "washed", "dry"],
  moulding: ["dry"],
  cutting: ["as-received", "washed", "dry"],
};

/** What may be planned into heat: PVC, "Mixed" and "Not sure" never. */
export const HEATABLE = ["PE-HD", "PP", "PE-LD", "PS", "PET", "ABS", "PLA", "PA", "PC"] as const;
export type Heatable = (typeof HEATABLE)[number] & Polymer;
/** Never above, in °C; sources in rules/reference.ts. */
export const CEILING_CELSIUS: Readonly<Record<Heatable, number>> = {
  "PE-HD": 274,
  PP: 260,
  "PE-LD": 260,
  PS: 246,
  PET: 310,
  ABS: 260,
  PLA: 220,
  PA: 288,
  PC: 321,
};

/**
 * planned: worked out, perhaps with stock reserved. open: started, volunteers may draw for it. finished: its
 * balance is zero and it is a batch. called-off: everything was returned.
 */
export const RUN_STATES = ["planned", "open", "finished", "called-off"] as const;
export type RunState = (typeof RUN_STATES)[number];
export const RUN_STATE_NAMES: Record<RunState, string> = {
  planned: "Planned",
  open: "Running",
  finished: "Finished",
  "called-off": "Called off",
};

/** Colours that one run can blend. */
export const MOST_COLOURS = 6;

/** held: promised. used: drawn to the last gram. released: given back. lapsed: its days were over. */
export const RESERVATION_STATES = ["held", "used", "released", "lapsed"] as const;
export type ReservationState = (typeof RESERVATION_STATES)[number];
