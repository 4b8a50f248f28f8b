/**
 * Reserving: one immediate transaction reads what is free and promises it, so that two leads never get the same gram.
 */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { newId, type Id, type LotId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import { instant, type Instant } from "@/lib/core/time";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { HELD_SQL, promisedGrams } from "@/lib/stock/queries/reserved";
import type {
  prolongEndpoint,
  releaseEndpoint,
  Reserved,
  reserveEndpoint,
} from "../contract/reservations";
import { lotsForRun, type LotForRun } from "../queries/lots-for-run";
import { oldestFirst, type FreeLot } from "../rules/reserving";
import type { ReservationState } from "../terms";
import { requirePlanned } from "./require-planned";

type RunId = Id<"run">;
const DAY = 24 * 60 * 60 * 1000;

/**
 * Promises what the run's blend still lacks, oldest lots first, or the grams of the lots that were chosen. By itself it
 * takes what is free, also for what turned short, and names the rest; by hand a lot that has less free refuses the whole.
 *
 * @throws AppError `not-found`, `run-not-planned`, `nothing-free`, `nothing-lacks`, `lot-not-for-run`, `lot-not-free`
 */
export function reserve(ctx: Context, input: z.output<typeof reserveEndpoint.input>): Reserved {
  allow(ctx, "production.plan");
  const person = requirePerson(ctx);
  return once<Reserved>(
    ctx,
    `POST /api/runs/${input.runId}/reservations`,
    input.requestId,
    (tx) => {
      const run = requirePlanned(tx, input.runId);
      const lots = lotsForRun(tx, run.id);
      const chosen = input.lots ? byHand(tx, lots, input.lots) : byItself(tx, ctx, run.id, lots);
      const { picks, uncovered } = chosen;
      const lapsesAt = lapseOf(tx, ctx.now);
      for (const { lotId, grams } of picks) {
        prepared(
          tx.client,
          `insert into reservations (id, seq, run_id, lot_id, promised_grams, grams, state, reserved_by, reserved_at,
             lapses_at)
           values (?, (select coalesce(max(seq), 0) + 1 from reservations), ?, ?, ?, ?, 'held', ?, ?, ?)`,
        ).run(newId(ctx.now), run.id, lotId, grams, grams, person, ctx.now, lapsesAt);
      }
      const grams = picks.reduce((sum, pick) => sum + pick.grams, 0);
      recordAudit(tx, ctx, {
        action: "runs.reserve",
        subjectKind: "run",
        subjectId: run.id,
        fields: { grams, lots: picks.map((pick) => `${pick.number}: ${pick.grams} g`).join(", ") },
      });
      return {
        number: run.number,
        picks: picks.map((pick) => ({ number: pick.number, grams: pick.grams })),
        grams,
        uncovered,
      };
    },
  );
}

type Chosen = {
  picks: { lotId: string; number: number; grams: number }[];
  uncovered: { colourCode: string; grams: number }[];
};

function byItself(tx: Tx, ctx: Context, runId: RunId, lots: readonly LotForRun[]): Chosen {
  giveUpShort(tx, ctx, runId);
  const lacking = (
    prepared(
      tx.client,
      `select c.colour_code as colourCode, c.grams - coalesce(sum(v.grams), 0) as grams
         from run_colours c
         left join (select v.run_id, v.grams, r.colour_code from reservations v
                      join lots l on l.id = v.lot_id join materials m on m.id = l.material_id
                      join rows r on r.id = m.row_id
                     where v.state = 'held') v on v.run_id = c.run_id and v.colour_code = c.colour_code
        where c.run_id = ? group by c.colour_code`,
    ).all(runId) as { colourCode: string; grams: number }[]
  ).filter(({ grams }) => grams > 0);
  if (lacking.length === 0) throw new AppError("nothing-lacks");
  const free = lots.filter(({ usable }) => usable).map((lot) => freeOf(tx, lot));
  const chosen = oldestFirst(lacking, free);
  if (chosen.picks.length === 0) throw new AppError("nothing-free");
  return chosen;
}

/** What the run's lots no longer cover is looked for elsewhere, and no longer promised there. */
function giveUpShort(tx: Tx, ctx: Context, runId: RunId): void {
  const short = prepared(
    tx.client,
    `select id, shortGrams from (${HELD_SQL}) where runId = ? and shortGrams > 0`,
  ).all(runId) as { id: string; shortGrams: number }[];
  for (const { id, shortGrams } of short) {
    prepared(
      tx.client,
      `update reservations set grams = grams - @short, state = iif(grams = @short, 'released', state),
         ended_at = iif(grams = @short, @now, null) where id = @id`,
    ).run({ id, short: shortGrams, now: ctx.now });
  }
}

function byHand(
  tx: Tx,
  lots: readonly LotForRun[],
  wanted: readonly { number: number; grams: number }[],
): Chosen {
  const seen = new Set<number>();
  const picks = wanted.map(({ number, grams }, at) => {
    const lot = lots.find((one) => one.number === number);
    if (!lot || !lot.usable || seen.has(number)) {
      throw new AppError("lot-not-for-run", { number }, ["lots", at, "number"]);
    }
    seen.add(number);
    const { freeGrams } = freeOf(tx, lot);
    if (grams > freeGrams) {
      throw new AppError(
        "lot-not-free",
        { number, freeKg: formatKg(Math.max(0, freeGrams)), wantedKg: formatKg(grams) },
        ["lots", at, "grams"],
      );
    }
    return { lotId: lot.lotId, number, grams };
  });
  return { picks, uncovered: [] };
}

const freeOf = (tx: Tx, { lotId, number, colourCode, heldGrams }: LotForRun): FreeLot => ({
  lotId,
  number,
  colourCode,
  freeGrams: heldGrams - promisedGrams(tx, lotId as LotId),
});

function lapseOf(tx: Tx, now: Instant): Instant {
  const days = prepared(tx.client, "select reservation_days from scheme_limits where id = 1")
    .pluck()
    .get() as number;
  return instant(now + days * DAY);
}

/**
 * Ends what a run has reserved. A step of a larger command.
 *
 * @returns grams that are free again
 */
export function releaseRunIn(
  tx: Tx,
  ctx: Context,
  runId: RunId,
  state: Exclude<ReservationState, "held">,
  only: Id<"reservation"> | null = null,
): number {
  const where = "run_id = @runId and state = 'held' and (@only is null or id = @only)";
  const released = prepared(
    tx.client,
    `select coalesce(sum(grams), 0) from reservations where ${where}`,
  )
    .pluck()
    .get({ runId, only }) as number;
  prepared(tx.client, `update reservations set state = @state, ended_at = @now where ${where}`).run(
    { runId, only, state, now: ctx.now },
  );
  return released;
}

/** @throws AppError `not-found`, `run-not-planned` */
export function release(
  ctx: Context,
  input: z.output<typeof releaseEndpoint.input>,
): { number: number; releasedGrams: number } {
  allow(ctx, "production.plan");
  return once(ctx, `POST /api/runs/${input.runId}/release`, input.requestId, (tx) => {
    const run = requirePlanned(tx, input.runId);
    const only = input.reservationId ?? null;
    const releasedGrams = releaseRunIn(tx, ctx, run.id, "released", only);
    recordAudit(tx, ctx, {
      action: "runs.release",
      subjectKind: "run",
      subjectId: run.id,
      fields: { grams: releasedGrams },
    });
    return { number: run.number, releasedGrams };
  });
}

/** @throws AppError `not-found`, `run-not-planned`, `nothing-reserved` */
export function prolong(
  ctx: Context,
  input: z.output<typeof prolongEndpoint.input>,
): { number: number; lapsesAt: number } {
  allow(ctx, "production.plan");
  return once(ctx, `POST /api/runs/${input.runId}/prolong`, input.requestId, (tx) => {
    const run = requirePlanned(tx, input.runId);
    const lapsesAt = lapseOf(tx, ctx.now);
    const { changes } = prepared(
      tx.client,
      "update reservations set lapses_at = ?, warned_at = null where run_id = ? and state = 'held'",
    ).run(lapsesAt, run.id);
    if (changes === 0) throw new AppError("nothing-reserved", { number: run.number });
    recordAudit(tx, ctx, {
      action: "runs.prolong",
      subjectKind: "run",
      subjectId: run.id,
      fields: { reservations: changes },
    });
    return { number: run.number, lapsesAt };
  });
}
