/** What stands in runs at the end of a period. Totals by row do not tell runs from lots, so lines do. */
import "server-only";
import type { Day } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";

/**
 * Grams in work at the start of a day. What runs hold now stands in the balances; what moved in them since
 * that day is taken off. Both are read through indexes that hold runs only.
 */
export function inWorkAt(db: Readable, until: Day): number {
  const now = prepared(
    db.client,
    `select coalesce(sum(b.grams), 0) from holders h cross join balances b on b.holder_id = h.id
      where h.kind = 'run'`,
  )
    .pluck()
    .get() as number;
  const since = prepared(
    db.client,
    `select coalesce(sum(n.grams), 0) from lines n cross join entries e on e.id = n.entry_id
      where n.account = 'run' and e.booked_day >= ?`,
  )
    .pluck()
    .get(until) as number;
  return now - since;
}
