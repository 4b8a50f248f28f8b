/** A bag's states, in the order in which it passes through them, and what a label can stand for. */
export const BAG_STATES = ["printed", "out", "picked-up", "weighed", "sorted", "closed"] as const;
export type BagState = (typeof BAG_STATES)[number];

export const BAG_STATE_NAMES: Record<BagState, string> = {
  printed: "Tag printed",
  out: "Out at its point",
  "picked-up": "Picked up",
  weighed: "Weighed, to sort",
  sorted: "Sorted",
  closed: "Closed",
};

export const LABEL_KINDS = ["bag", "lot", "container", "run", "batch"] as const;
export type LabelKind = (typeof LABEL_KINDS)[number];
