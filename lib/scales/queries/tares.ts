/** What containers and sacks weighed, and when that was found. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared } from "@/lib/platform/database";

export type Tare = {
  validFrom: Instant;
  tareMilligrams: number;
  /** null: entered before names were kept. */
  byName: string | null;
};

/** Tares that a row shows; older ones stay in the table. */
const MOST_TARES = 20;

/** The history of every container and sack, newest first. */
export function listTares(ctx: Context): ReadonlyMap<Id<"container">, Tare[]> {
  allow(ctx, "scales.manage");
  const found = prepared(
    ctx.db.reader.client,
    `select t.container_id as containerId, t.valid_from as validFrom, t.tare_mg as tareMilligrams, p.name as byName
       from container_tares t left join people p on p.id = t.set_by
      order by t.container_id, t.valid_from desc`,
  ).all() as (Tare & { containerId: Id<"container"> })[];
  const byContainer = new Map<Id<"container">, Tare[]>();
  for (const { containerId, ...tare } of found) {
    const own = byContainer.get(containerId) ?? [];
    if (own.length < MOST_TARES) own.push(tare);
    byContainer.set(containerId, own);
  }
  return byContainer;
}
