/** What a report can be broken down by, in the order of its columns, and the words of its columns. */
import type { OriginType } from "@/lib/ledger/terms";

export const GROUPINGS = ["month", "point", "polymer", "kind", "colour"] as const;
export type Grouping = (typeof GROUPINGS)[number];

export const GROUPING_NAMES: Record<Grouping, string> = {
  month: "Month",
  point: "Drop-off point",
  polymer: "Polymer",
  kind: "Kind",
  colour: "Colour",
};

/** Where plastic that no drop-off point gave came from; a donated origin has its point's name instead. */
export const ORIGIN_NAMES: Record<OriginType, string> = {
  donated: "Donated, point not known",
  collector: "Other collector",
  "pre-consumer": "Pre-consumer scrap",
  bought: "Bought in",
  additive: "Additive",
  unknown: "Not known",
};

/** A report row that has no polymer, kind or colour: bags not sorted yet, and the reject bin. */
export const LOOSE_ROWS = ["unsorted", "reject"] as const;
export type LooseRow = (typeof LOOSE_ROWS)[number];
export const LOOSE_NAMES: Record<LooseRow, string> = { unsorted: "Unsorted", reject: "Reject" };

/** Rows of one page of a report's table. */
export const ROWS_A_PAGE = 100;
