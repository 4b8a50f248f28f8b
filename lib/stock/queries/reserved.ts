/**
 * What of the lots is promised to runs. Which promises a lot no longer covers is not stored: it follows from its balance,
 * the newest turning short first.
 */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { prepared, type Readable } from "@/lib/platform/database";

/** The grams that lots still owe, promise by promise; in every lot older promises are covered first. */
export const HELD_SQL = `
  select v.id, v.run_id as runId, v.lot_id as lotId, v.seq, v.grams,
         max(0, min(v.grams, sum(v.grams) over (partition by v.lot_id order by v.seq) - coalesce(b.grams, 0)))
           as shortGrams,
         v.reserved_at as reservedAt, v.lapses_at as lapsesAt
    from reservations v
    join lots l on l.id = v.lot_id
    left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id
   where v.state = 'held'`;

export type Promised = {
  id: Id<"reservation">;
  runId: Id<"run">;
  lotId: LotId;
  seq: number;
  grams: number;
  /** What of them the lot does not cover. */
  shortGrams: number;
  reservedAt: Instant;
  lapsesAt: Instant;
};

/** Promises of one lot, oldest first. */
export function promisedOf(db: Readable, lotId: LotId): Promised[] {
  return prepared(db.client, `${HELD_SQL} and v.lot_id = ? order by v.seq`).all(
    lotId,
  ) as Promised[];
}

/** Grams of a lot that are promised, whether or not it covers them. */
export function promisedGrams(db: Readable, lotId: LotId): number {
  return prepared(
    db.client,
    "select coalesce(sum(grams), 0) from reservations where lot_id = ? and state = 'held'",
  )
    .pluck()
    .get(lotId) as number;
}

/**
 * Whoever takes grams that are promised to a run is asked once; who then says so takes them, and the newest promise
 * turns short.
 *
 * @param leftGrams what the lot holds once they are taken
 * @param knowingly it was asked and answered
 * @param path of the taking in the request
 * @throws AppError `lot-reserved` with what is promised, what would be left and the runs
 */
export function askForReserved(
  db: Readable,
  lot: { lotId: LotId; number: number },
  leftGrams: number,
  knowingly: boolean,
  path: readonly (string | number)[],
): void {
  if (knowingly) return;
  const promised = promisedGrams(db, lot.lotId);
  if (promised === 0 || leftGrams >= promised) return;
  const runs = prepared(
    db.client,
    `select distinct u.number from reservations v join runs u on u.id = v.run_id
      where v.lot_id = ? and v.state = 'held' order by u.number`,
  )
    .pluck()
    .all(lot.lotId) as number[];
  throw new AppError(
    "lot-reserved",
    {
      number: lot.number,
      promisedKg: formatKg(promised),
      leftKg: formatKg(Math.max(0, leftGrams)),
      runs: runs.join(", "),
    },
    [...path, "reservedToo"],
  );
}
