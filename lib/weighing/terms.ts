export const CONDITIONS = ["clean", "dirty", "wet"] as const;
export type Condition = (typeof CONDITIONS)[number];
export const CONDITION_NAMES: Record<Condition, string> = {
  clean: "Clean",
  dirty: "Dirty",
  wet: "Wet",
};

/** posted: in the ledger. for-review: a second reading of a bag, kept outside it. corrected: another stands for it. */
export const WEIGH_IN_STATES = [
  "posted",
  "for-review",
  "undone",
  "discarded",
  "corrected",
] as const;
export type WeighInState = (typeof WEIGH_IN_STATES)[number];

/** Readings that one bag can be weighed in. */
export const MOST_READINGS = 20;

/** What is implausible is asked, not refused; a question names itself in `confirmed` once answered. */
export const QUESTIONS = ["far-above-usual", "future-time"] as const;
export type Question = (typeof QUESTIONS)[number];

/** Where the endpoints are, for pages that send without carrying the contract's schemas. */
export const WEIGH_IN_ADDRESS = { method: "POST", path: "/api/weigh-ins" } as const;
export const UNDO_WEIGH_IN_ADDRESS = { method: "POST", path: "/api/weigh-ins/{id}/undo" } as const;
export const TODAY_ADDRESS = { method: "GET", path: "/api/weigh-ins/today" } as const;
export const SCANNED_ADDRESS = { method: "GET", path: "/api/bags/{code}" } as const;
