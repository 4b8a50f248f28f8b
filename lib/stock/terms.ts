/** How a palette colour looks: one solid colour, see-through, or many. */
export const COLOUR_LOOKS = ["solid", "clear", "mixed"] as const;
export type ColourLook = (typeof COLOUR_LOOKS)[number];

/** The palette that a scheme starts with (product.md, Sorting); coordinators may add and change. */
export const FIRST_PALETTE: readonly {
  code: string;
  name: string;
  hex: string;
  look: ColourLook;
}[] = [
  { code: "clear", name: "Clear or natural", hex: "#e6e6dc", look: "clear" },
  { code: "white", name: "White", hex: "#f5f3ec", look: "solid" },
  { code: "grey", name: "Grey", hex: "#8d9490", look: "solid" },
  { code: "black", name: "Black", hex: "#17201d", look: "solid" },
  { code: "brown", name: "Brown", hex: "#7a4b2a", look: "solid" },
  { code: "red", name: "Red", hex: "#e2553d", look: "solid" },
  { code: "orange", name: "Orange", hex: "#f08a24", look: "solid" },
  { code: "yellow", name: "Yellow", hex: "#f0b429", look: "solid" },
  { code: "green", name: "Green", hex: "#2f9e6e", look: "solid" },
  { code: "light-blue", name: "Light blue", hex: "#8fb8e8", look: "solid" },
  { code: "blue", name: "Blue", hex: "#1f46d6", look: "solid" },
  { code: "purple", name: "Purple", hex: "#7c5cc9", look: "solid" },
  { code: "pink", name: "Pink", hex: "#e8a2b8", look: "solid" },
  { code: "mixed", name: "Mixed", hex: "#b9b3a3", look: "mixed" },
];

/** posted: in the ledger. undone: taken back by who saved it. corrected: taken back, perhaps with another in its place. */
export const RECORD_STATES = ["posted", "undone", "corrected"] as const;
export type RecordState = (typeof RECORD_STATES)[number];

/** Why a lot takes no more: its container is full or empty, a step began, it grew old, it was merged, somebody said so. */
export const LOT_ENDS = ["full", "empty", "step", "age", "merged", "by-hand"] as const;
export type LotEnd = (typeof LOT_ENDS)[number];
export const LOT_END_NAMES: Record<LotEnd, string> = {
  full: "its container is full",
  empty: "its container is empty",
  step: "a step began",
  age: "it was open for the set weeks",
  merged: "it went into another lot",
  "by-hand": "somebody closed it",
};

/** Lots as a list shows them. held: something is in it. closed: closed and not empty. empty: nothing is in it. */
export const LOT_STATES = ["held", "open", "closed", "empty", "all"] as const;
export type LotState = (typeof LOT_STATES)[number];
export const LOT_STATE_NAMES: Record<LotState, string> = {
  held: "Hold something",
  open: "Open",
  closed: "Closed, not empty",
  empty: "Empty",
  all: "All",
};

/**
 * count: the container was weighed. empty: the bin is empty. on-the-spot: more was wanted than the book held.
 * opening: what stood there on the scheme's first day.
 */
export const COUNT_KINDS = ["count", "empty", "on-the-spot", "opening"] as const;
export type CountKind = (typeof COUNT_KINDS)[number];
export const COUNT_KIND_NAMES: Record<CountKind, string> = {
  count: "Counted",
  empty: "Bin is empty",
  "on-the-spot": "Counted on the spot",
  opening: "Opening stock",
};

export const MOVE_KINDS = ["merge", "split", "identify"] as const;
export type MoveKind = (typeof MOVE_KINDS)[number];
export const MOVE_KIND_NAMES: Record<MoveKind, string> = {
  merge: "Merged",
  split: "Split off",
  identify: "Identified",
};

/** How "Not sure" was found out: the code on the item, floats or sinks, how it bends, asked somebody who knows. */
export const IDENTIFY_METHODS = ["code", "float", "flexibility", "asked"] as const;
export type IdentifyMethod = (typeof IDENTIFY_METHODS)[number];
export const IDENTIFY_METHOD_NAMES: Record<IdentifyMethod, string> = {
  code: "Code on the item",
  float: "Floats or sinks",
  flexibility: "How it bends",
  asked: "Asked somebody who knows",
};

export const STEP_KINDS = ["washing", "drying", "shredding"] as const;
export type StepKind = (typeof STEP_KINDS)[number];
export const STEP_KIND_NAMES: Record<StepKind, string> = {
  washing: "Washing",
  drying: "Drying",
  shredding: "Shredding",
};

/** Taken out and weighed, or weighed back: the container before less after. */
export const TAKING = ["taken", "weighed-back"] as const;
export type Taking = (typeof TAKING)[number];

/** Readings of one weighing: a big bin is weighed in several goes. */
export const MOST_READINGS = 12;
/** Lots that one step can draw from, and readings that can come out of it. */
export const MOST_STEP_INPUTS = 12;
export const MOST_STEP_OUTPUTS = 24;
