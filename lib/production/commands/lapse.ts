/** What the program does with reservations by itself: mails a day before they lapse, and when they turn short; lapses. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import type { Id } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { queueMailIn } from "@/lib/mail/commands/queue";
import type { Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Tx } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { requireScheme } from "@/lib/platform/scheme";
import { HELD_SQL } from "@/lib/stock/queries/reserved";
import { lapseMail, shortMail } from "../rules/mails";

const DAY = 24 * 60 * 60 * 1000;

/** Runs in one go at most; the next tick takes the rest, so that no transaction is long. */
const MOST = 50;

type Told = {
  runId: Id<"run">;
  number: number;
  pieceName: string;
  grams: number;
  shortGrams: number;
  lapsesAt: Instant;
  /** The planner's address; null when they left. */
  address: string | null;
};

/** Runs with what they have reserved, of the reservations that the condition names. */
const runsSql = (condition: string): string => `
  select u.id as runId, u.number, p.name as pieceName, sum(h.grams) as grams, sum(h.shortGrams) as shortGrams,
         min(h.lapsesAt) as lapsesAt, d.email as address
    from (${HELD_SQL}) h
    join reservations v on v.id = h.id
    join runs u on u.id = h.runId
    join pieces p on p.id = u.piece_id
    left join people d on d.id = v.reserved_by and d.removed_at is null
   where ${condition}
   group by u.id limit ${MOST}`;

/**
 * One pass over the reservations.
 *
 * @returns how many runs were told and how many lapsed
 */
export function tendReservations(ctx: Context): { warned: number; short: number; lapsed: number } {
  return inTransaction(ctx, (tx) => {
    const lapsed = read(tx, "h.lapsesAt <= @now", { now: ctx.now });
    for (const { runId, grams } of lapsed) {
      // Only what is due: the run may have reserved other lots later.
      prepared(
        tx.client,
        `update reservations set state = 'lapsed', ended_at = @now
          where run_id = @runId and state = 'held' and lapses_at <= @now`,
      ).run({ runId, now: ctx.now });
      recordAudit(tx, ctx, {
        action: "runs.lapse",
        subjectKind: "run",
        subjectId: runId,
        fields: { grams },
      });
    }
    const warned = read(tx, "v.warned_at is null and h.lapsesAt <= @soon", {
      soon: ctx.now + DAY,
    });
    tell(tx, ctx, warned, "warned_at", `lapses_at <= @now + ${DAY}`, lapseMail);
    // Covered again, it may turn short again and is told again.
    prepared(
      tx.client,
      `update reservations set told_short_at = null where told_short_at is not null and state = 'held'
         and id not in (select id from (${HELD_SQL}) where shortGrams > 0)`,
    ).run();
    // All that the run has reserved and lacks, not only what turned short since it was told last.
    const short = read(
      tx,
      `u.id in (select s.runId from (${HELD_SQL}) s join reservations t on t.id = s.id
                 where t.told_short_at is null and s.shortGrams > 0)`,
    );
    const isShort = `id in (select id from (${HELD_SQL}) where shortGrams > 0)`;
    tell(tx, ctx, short, "told_short_at", isShort, shortMail);
    return { warned: warned.length, short: short.length, lapsed: lapsed.length };
  });
}

function read(tx: Tx, condition: string, values: Readonly<Record<string, number>> = {}): Told[] {
  return prepared(tx.client, runsSql(condition)).all(values) as Told[];
}

function tell(
  tx: Tx,
  ctx: Context,
  runs: readonly Told[],
  column: "warned_at" | "told_short_at",
  concerned: string,
  words: typeof lapseMail,
): void {
  const { timeZone } = requireScheme(tx);
  const mark = prepared(
    tx.client,
    `update reservations set ${column} = @now
      where run_id = @runId and state = 'held' and ${column} is null and ${concerned}`,
  );
  for (const run of runs) {
    mark.run({ now: ctx.now, runId: run.runId });
    if (run.address === null) continue;
    const address = new URL(`/runs/${run.number}`, settings().publicUrl).href;
    queueMailIn(tx, ctx, { to: run.address, ...words({ ...run, address }, timeZone) });
  }
}
