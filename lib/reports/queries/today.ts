/** What waits in the shed and what was done today, in figures; never a person's name. */
import "server-only";
import type { ScaleId } from "@/lib/core/ids";
import { addDays, dayOf, startOfDay, type Day } from "@/lib/core/time";
import { UNSORTED } from "@/lib/ledger/terms";
import { allow, may, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { isConfirmedOn } from "@/lib/scales/queries/instruments";
import { getStorageStanding } from "@/lib/stock/queries/limits";
import { limitsTold } from "@/lib/stock/rules/limits";
import type { DoneToday, Waiting } from "../rules/desk-words";

const PERMIT_NOTICE_DAYS = 30;

function one<T>(db: Readable, sql: string, ...values: unknown[]): T {
  return prepared(db.client, sql).get(...values) as T;
}

const count = (db: Readable, sql: string, ...values: unknown[]): number =>
  prepared(db.client, sql)
    .pluck()
    .get(...values) as number;

/** @returns what waits, by what the reader may do about it, and what was done since midnight in the scheme's zone */
export function getDesk(ctx: Context): { waiting: Waiting; done: DoneToday } {
  allow(ctx, "weighing.record");
  return inSnapshot<{ waiting: Waiting; done: DoneToday }>(ctx, (db) => {
    const { timeZone } = requireScheme(db);
    const today = dayOf(ctx.now, timeZone);
    return {
      waiting: {
        bagsToWeigh: count(db, "select count(*) from bags where state = 'picked-up'"),
        bagsToSort: one(
          db,
          `select count(*) as bags, coalesce(sum(grams), 0) as grams from balances
            where grams > 0 and material_id = ?`,
          UNSORTED,
        ),
        sessionsAside: count(db, "select count(*) from sorting_drafts where state = 'open'"),
        scalesToCheck: scalesToCheck(db, today),
        leading: may(ctx, "weighing.review") ? waitingForLeads(db, ctx, today) : null,
      },
      done: doneSince(db, startOfDay(today, timeZone)),
    };
  });
}

function scalesToCheck(db: Readable, today: Day): Waiting["scalesToCheck"] {
  const scales = prepared(
    db.client,
    "select id, name from scales where retired_at is null order by number",
  ).all() as { id: ScaleId; name: string }[];
  return scales.filter(({ id }) => !isConfirmedOn(db, id, today));
}

function waitingForLeads(db: Readable, ctx: Context, today: Day): Waiting["leading"] {
  const permits = prepared(
    db.client,
    `select name, permit_until as until from destinations
      where retired_at is null and permit_until <= ? order by permit_until, name`,
  ).all(addDays(today, PERMIT_NOTICE_DAYS)) as { name: string; until: Day }[];
  return {
    readingsToReview: count(db, "select count(*) from weigh_ins where state = 'for-review'"),
    countsToReview: count(
      db,
      "select count(*) from counts where reviewed_at is null and state = 'posted'",
    ),
    receiptsMissing: count(
      db,
      `select count(*) from removals r where r.route = 'passed-on' and r.state = 'posted'
         and not exists (select 1 from removal_receipts t where t.removal_id = r.id and t.state = 'posted')`,
    ),
    permits: permits.map((permit) => ({ ...permit, over: permit.until < today })),
    limits: limitsTold(getStorageStanding(ctx)),
  };
}

function doneSince(db: Readable, from: number): DoneToday {
  return {
    weighed: one(
      db,
      `select count(*) as bags, coalesce(sum(net_grams), 0) as grams from weigh_ins
        where recorded_at >= ? and state = 'posted'`,
      from,
    ),
    sorted: one(
      db,
      `select count(*) as sessions, coalesce(sum(net_grams), 0) as grams from sorting_sessions
        where recorded_at >= ? and state = 'closed'`,
      from,
    ),
    steps: count(
      db,
      "select count(*) from steps where recorded_at >= ? and state = 'posted'",
      from,
    ),
    counts: count(
      db,
      "select count(*) from counts where recorded_at >= ? and state = 'posted'",
      from,
    ),
    removals: one(
      db,
      `select count(*) as count, coalesce(sum(grams), 0) as grams from removals
        where recorded_at >= ? and state = 'posted'`,
      from,
    ),
  };
}
