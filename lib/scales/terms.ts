/** Accuracy classes of OIML R 76 that a shed meets; "none": not verified, with a stated accuracy. */
export const SCALE_CLASSES = ["III", "IIII", "none"] as const;
export type ScaleClass = (typeof SCALE_CLASSES)[number];

export const TARE_KINDS = ["container", "sack"] as const;
export type TareKind = (typeof TARE_KINDS)[number];

export const SCALE_CLASS_NAMES: Record<ScaleClass, string> = {
  III: "Class III",
  IIII: "Class IIII",
  none: "Not verified",
};

export const TARE_KIND_NAMES: Record<TareKind, string> = { container: "Container", sack: "Sack" };

/**
 * How a scale stands on a day. confirmed: its last check weight was within the limits. cleared: a lead's word. failed-once: it may
 * be repeated. failed: twice, nothing more but a lead's word.
 */
export const SCALE_DAY_STATES = [
  "confirmed",
  "cleared",
  "failed-once",
  "failed",
  "not-checked",
] as const;
export type ScaleDayState = (typeof SCALE_DAY_STATES)[number];

export const SCALE_DAY_WORDS: Record<ScaleDayState, string> = {
  confirmed: "Checked today",
  cleared: "Cleared today",
  "failed-once": "Check failed",
  failed: "Not confirmed",
  "not-checked": "Not checked today",
};

/** Readings on a scale in one of these are booked as weighed on a checked scale. */
export const CONFIRMED_STATES: readonly ScaleDayState[] = ["confirmed", "cleared"];

/** Where the endpoint is, for capture pages that send without carrying the contract's schemas. */
export const SCALES_TODAY_ADDRESS = { method: "GET", path: "/api/scales/today" } as const;
