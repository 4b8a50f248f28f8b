/** Invariant: every kind of entry has its own words in a lot's history. */
import { ENTRY_KINDS, type EntryKind } from "@/lib/ledger/terms";

/** What an entry is called in a lot's history. */
export const ENTRY_WORDS: Record<EntryKind, string> = {
  "weigh-in": "Weighed in as one kind",
  sort: "Sorted into it",
  step: "Step",
  identify: "Identified",
  move: "Moved",
  count: "Counted",
  opening: "Counted in on the first day",
  draw: "Taken out",
  return: "Put back",
  finish: "Came from a run",
  cut: "Cutting",
  "take-back": "Pieces taken back",
  removal: "Taken away",
  receipt: "Receipt",
  import: "Imported",
  reversal: "Taken back",
  settling: "Settled after a correction",
};

/** Is it a kind of entry that this program knows? */
export function isEntryKind(kind: string): kind is EntryKind {
  return ENTRY_KINDS.some((known) => known === kind);
}
