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

/** The page of the record; a count stands on the lot's own page. */
function recordHref({ record }: LotMovement): Route | null {
  const { kind, id, otherNumber } = record;
  if (kind === "step") return `/steps/${id}`;
  if (kind === "sorting") return `/sorting/sessions/${id}`;
  if (kind === "weigh-in") return `/weigh-ins/${id}`;
  if (kind === "removal") return `/removals/${id}`;
  return otherNumber === null ? null : `/stock/lots/${otherNumber}`;
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
