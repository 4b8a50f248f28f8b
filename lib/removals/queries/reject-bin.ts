/** What the reject bin holds, and since when. */
import "server-only";
import type { Instant } from "@/lib/core/time";
import { heldBy } from "@/lib/ledger/queries/entries";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared } from "@/lib/platform/database";
import { findRejectBin } from "./stored";

export type RejectBin = {
  heldGrams: number;
  /** When the first reject went in after it was last empty; null while it is empty. */
  since: Instant | null;
};

export function getRejectBin(ctx: Context): RejectBin {
  allow(ctx, "removals.read");
  return inSnapshot<RejectBin>(ctx, (db) => {
    const bin = findRejectBin(db);
    const heldGrams = bin ? heldBy(db, bin.holderId, bin.materialId) : 0;
    if (!bin || heldGrams === 0) return { heldGrams, since: null };
    const since = prepared(
      db.client,
      `select min(e.occurred_at) from lines l join entries e on e.id = l.entry_id
        where l.holder_id = @holderId and l.grams > 0 and l.entry_id > coalesce(
          (select entry_id from lines where holder_id = @holderId and after = 0
            order by entry_id desc limit 1), 0)`,
    )
      .pluck()
      .get({ holderId: bin.holderId }) as Instant | null;
    return { heldGrams, since };
  });
}
