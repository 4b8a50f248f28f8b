/** What stands in runs at the end of a period. Totals by row do not tell runs from lots, so lines do. */
import "server-only";
import type { Day } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";

/**
 * Grams in work at the start of a day. What runs hold now stands in the balances; what moved in them since
 * that day is taken off, which costs as much as was booked since then: nothing for a period that ends today.
 */
export function inWorkAt(db: Readable, until: Day): number {
  const now = prepared(
    db.client,
    `select coalesce(sum(b.grams), 0) from balances b join holders h on h.id = b.holder_id
      where b.grams > 0 and h.kind = 'run'`,
  )
    .pluck()
    .get() as number;
  const since = prepared(
    db.client,
    `select coalesce(sum(n.grams), 0) from entries e join lines n on n.entry_id = e.id
      where e.booked_day >= ? and n.account = 'run'`,
  )
    .pluck()
    .get(until) as number;
  return now - since;
}
