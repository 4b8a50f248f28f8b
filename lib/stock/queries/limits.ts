import "server-only";
import type { Instant } from "@/lib/core/time";
import { dayOf, daysBetween } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import type { Limits, StorageStanding } from "../contract/limits";

export function readLimits(db: Readable): Limits {
  const { storageGrams, ...limits } = prepared(
    db.client,
    `select lot_weeks as lotWeeks, storage_grams as storageGrams, storage_days as storageDays,
            reservation_days as reservationDays
       from scheme_limits where id = 1`,
  ).get() as Omit<Limits, "storageKg"> & { storageGrams: number | null };
  return { ...limits, storageKg: storageGrams === null ? null : Math.floor(storageGrams / 1000) };
}

/** What lies in the shed (bags, lots, work in hand, reject bin), since when the oldest, and the limits. */
export function getStorageStanding(ctx: Context): StorageStanding {
  allow(ctx, "stock.read");
  return inSnapshot(ctx, (db): StorageStanding => {
    const heldGrams = prepared(
      db.client,
      `select coalesce(sum(b.grams), 0) from balances b join holders h on h.id = b.holder_id
        where b.grams > 0 and h.kind <> 'batch'`,
    )
      .pluck()
      .get() as number;
    const oldest = prepared(
      db.client,
      `select min(since) from (
         select min(state_since) as since from bags where state = 'weighed'
         union all
         select min(l.opened_at) from lots l join balances b on b.holder_id = l.holder_id where b.grams > 0)`,
    )
      .pluck()
      .get() as Instant | null;
    const { timeZone } = requireScheme(db);
    return {
      heldGrams,
      oldestDays:
        oldest === null ? 0 : daysBetween(dayOf(oldest, timeZone), dayOf(ctx.now, timeZone)),
      limits: readLimits(db),
    };
  });
}
