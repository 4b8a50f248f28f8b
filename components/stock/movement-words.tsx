import type { Route } from "next";
import Link from "next/link";
import type { LotMovement } from "@/lib/stock/contract/lots";
import { ENTRY_WORDS, isEntryKind } from "@/lib/stock/rules/entry-words";
import {
  COUNT_KIND_NAMES,
  COUNT_KINDS,
  MOVE_KIND_NAMES,
  MOVE_KINDS,
  STEP_KIND_NAMES,
  STEP_KINDS,
} from "@/lib/stock/terms";

/** "Shredding", "Merged from lot 12", "Bin is empty": what an entry was, as its record says it. */
function recordWords({ kind, grams, record }: LotMovement): string {
  const { detail, otherNumber } = record;
  const step = STEP_KINDS.find((known) => known === detail);
  if (record.kind === "step" && step) return STEP_KIND_NAMES[step];
  const count = COUNT_KINDS.find((known) => known === detail);
  if (record.kind === "count" && count) return COUNT_KIND_NAMES[count];
  const move = MOVE_KINDS.find((known) => known === detail);
  if (record.kind === "lot-move" && move && otherNumber !== null) {
    return `${MOVE_KIND_NAMES[move]} ${grams < 0 ? "to" : "from"} lot ${otherNumber}`;
  }
  return isEntryKind(kind) ? ENTRY_WORDS[kind] : kind;
}

const PAGES: Partial<Record<LotMovement["record"]["kind"], string>> = {
  step: "/steps",
  sorting: "/sorting/sessions",
  "weigh-in": "/weigh-ins",
  removal: "/removals",
};

/** The page of the record, or the other lot of a move; a count stands on the lot's own page. */
function recordHref({ record }: LotMovement): Route | null {
  const page = PAGES[record.kind];
  // A path becomes a Route by our word: the list is data, and browser tests open these pages.
  if (page) return `${page}/${record.id}` as Route;
  return record.otherNumber === null ? null : (`/stock/lots/${record.otherNumber}` as Route);
}

/** What a movement was, with the way to its record. */
export function MovementWords({ movement }: { movement: LotMovement }) {
  const { kind, reverses, entryId } = movement;
  const taken = kind === "reversal" || kind === "settling";
  const words = recordWords(movement);
  const href = recordHref(movement);
  return (
    <>
      <span className="block">
        {taken && isEntryKind(kind) ? `${ENTRY_WORDS[kind]}: ` : ""}
        {href ? (
          <Link href={href} className="link inline-flex min-h-11 items-center">
            {words}
          </Link>
        ) : taken ? (
          words.toLowerCase()
        ) : (
          words
        )}
      </span>
      <span className="block text-sm text-soft">
        Entry {entryId}
        {reverses === null ? "" : `, takes back entry ${reverses}`}
      </span>
    </>
  );
}
