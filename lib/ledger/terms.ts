/** The ledger's closed lists. Codes are stored and hashed: a name here is never changed, only added. */

export const ACCOUNTS = [
  "source",
  "bag",
  "lot",
  "run",
  "reject-bin",
  "pieces",
  "disposed",
  "passed-on",
  "loss",
  "difference",
  "opening",
  "before-opening",
] as const;
export type Account = (typeof ACCOUNTS)[number];

/** Accounts with a holder, whose balance is never negative. `pieces` is physical but not in the shed. */
export const PHYSICAL = ["bag", "lot", "run", "reject-bin", "pieces"] as const;
export type PhysicalAccount = (typeof PHYSICAL)[number];
export const IN_THE_SHED = ["bag", "lot", "run", "reject-bin"] as const;

export const HOLDER_KINDS = ["bag", "lot", "run", "reject-bin", "batch"] as const;
export type HolderKind = (typeof HOLDER_KINDS)[number];

export const ORIGIN_TYPES = [
  "donated",
  "collector",
  "pre-consumer",
  "bought",
  "additive",
  "unknown",
] as const;
export type OriginType = (typeof ORIGIN_TYPES)[number];

export const ENTRY_KINDS = [
  "weigh-in",
  "sort",
  "step",
  "identify",
  "move",
  "count",
  "opening",
  "draw",
  "return",
  "finish",
  "cut",
  "take-back",
  "removal",
  "receipt",
  "import",
  "reversal",
  "settling",
] as const;
export type EntryKind = (typeof ENTRY_KINDS)[number];

export const LOSS_CAUSES = [
  "liquid",
  "dirt",
  "metal",
  "moisture",
  "dust",
  "cuttings",
  "spilled",
] as const;
export type LossCause = (typeof LOSS_CAUSES)[number];
export const LOSS_CAUSE_NAMES: Record<LossCause, string> = {
  liquid: "Liquid and residue",
  dirt: "Dirt and labels",
  metal: "Metal and glue",
  moisture: "Moisture",
  dust: "Dust and fume",
  cuttings: "Cuttings",
  spilled: "Spilled",
};

export const BASES = ["checked", "unchecked", "estimated", "imported", "stated"] as const;
export type Basis = (typeof BASES)[number];
export const BASIS_NAMES: Record<Basis, string> = {
  checked: "Weighed on a checked scale",
  unchecked: "Weighed, scale unchecked",
  estimated: "Estimated",
  imported: "Imported",
  stated: "Stated by another",
};

/** What totals_scale sums by: collected is the part of `source` that was donated. */
export const MEASURES = [
  "collected",
  "other-in",
  "opening",
  "accepted",
  "rejected",
  "counted",
  "disposed",
  "passed-on",
  "pieces",
] as const;
export type Measure = (typeof MEASURES)[number];

export const DIMENSIONS = ["O", "H"] as const;
/** O: by origin number. H: by times heated (0, 1, 2, 3 = three or more). */
export type Dimension = (typeof DIMENSIONS)[number];

/** Rows and materials that exist from the first migration. */
export const UNSORTED = 1;
export const REJECT = 2;
export const UNKNOWN_ORIGIN = 0;
export const RULE_VERSION = 1;

/** Name of the verifying job; its lease row keeps the last result. */
export const VERIFY_JOB = "ledger-verify";
