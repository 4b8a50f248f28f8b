import "server-only";
import { listActEntries, loadLines } from "@/lib/ledger/queries/entries";
import type { Readable } from "@/lib/platform/database";

/** What a session took from each bag, in grams, by the bag's holder in the ledger. */
export function takenFromBags(db: Readable, actId: number): Map<number, number> {
  const taken = new Map<number, number>();
  for (const { id, kind } of listActEntries(db, actId)) {
    if (kind !== "sort") continue;
    for (const line of loadLines(db, id)) {
      if (line.account !== "bag" || line.holderId === null) continue;
      taken.set(line.holderId, (taken.get(line.holderId) ?? 0) - line.grams);
    }
  }
  return taken;
}
