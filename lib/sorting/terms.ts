/** closed: in the ledger. corrected: taken back, another session stands for it or nothing does. */
export const SORTING_STATES = ["closed", "undone", "corrected"] as const;
export type SortingState = (typeof SORTING_STATES)[number];

/** open: on a table, or put aside. saved: it became a session. given-up: its bags wait again. */
export const DRAFT_STATES = ["open", "saved", "given-up"] as const;

/** The ledger's holder of what was turned away, at the one site there is. */
export const REJECT_BIN_CODE = "REJECT-BIN-1";

/** Reject reasons that a scheme starts with (product.md); coordinators may add and rename. */
export const FIRST_REJECT_REASONS = [
  { code: "food", name: "Food or dirt", warning: false },
  { code: "film", name: "Film or foam not taken", warning: false },
  { code: "stuck", name: "Stuck-together materials", warning: false },
  { code: "black", name: "Black without a code", warning: false },
  { code: "electronics", name: "Electronics", warning: false },
  { code: "pvc", name: "PVC", warning: false },
  { code: "compostable", name: "Compostable", warning: false },
  { code: "chemical", name: "Chemical, oil or medical container", warning: true },
  { code: "sharps", name: "Sharps or battery", warning: true },
  { code: "brittle", name: "Sun-brittle", warning: false },
  { code: "too-big", name: "Too big", warning: false },
  { code: "no-use", name: "No use for it now", warning: false },
] as const;

/** Bags that can be tipped together. */
export const MOST_BAGS = 40;
/** Piles and rejects of one session. */
export const MOST_FRACTIONS = 60;

/** Where the endpoints are, for a page that sends without carrying the contract's schemas. */
export const CLOSE_SORTING_ADDRESS = { method: "POST", path: "/api/sortings" } as const;
export const UNDO_SORTING_ADDRESS = { method: "POST", path: "/api/sortings/{id}/undo" } as const;
export const CORRECT_SORTING_ADDRESS = {
  method: "POST",
  path: "/api/sortings/{id}/correct",
} as const;
export const WAITING_BAGS_ADDRESS = { method: "GET", path: "/api/sortings/waiting" } as const;
export const BAG_TO_SORT_ADDRESS = { method: "GET", path: "/api/sortings/bags/{code}" } as const;
export const REJECT_REASONS_ADDRESS = { method: "GET", path: "/api/reject-reasons" } as const;
