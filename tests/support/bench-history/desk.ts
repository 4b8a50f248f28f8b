/** What every act of a random history needs: who stands where, and a pick of what there is. */
import type { Random } from "@/db/seed/random";
import { newId, type Id } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";
import { NOON } from "../scheme";
import type { Shed } from "../shed";

export type Bench = {
  shed: Shed;
  random: Random;
  /** Moves on with every act, so that undo is sometimes too late. */
  now: Instant;
  destinations: { disposed: Id<"destination">; passedOn: Id<"destination"> };
};

export type LotRow = { number: number; grams: number };

export const rows = <T>(bench: Bench, sql: string, ...values: unknown[]): T[] =>
  bench.shed.db.reader.client.prepare(sql).all(...values) as T[];
export const pickRow = <T>(bench: Bench, sql: string, ...values: unknown[]): T | undefined => {
  const found = rows<T>(bench, sql, ...values);
  return found.length === 0 ? undefined : bench.random.pick(found);
};

export const LOTS = `select l.number, coalesce(b.grams, 0) as grams from lots l
  left join balances b on b.holder_id = l.holder_id and b.material_id = l.material_id`;
export const lot = (bench: Bench, least = 1): LotRow | undefined =>
  pickRow(bench, `${LOTS} where coalesce(b.grams, 0) >= ?`, least);

export const within = (random: Random, from: number, to: number): number =>
  from + random.int(Math.max(1, to - from + 1));
/** A weight as the bench scale shows it: whole steps of 5 g, at least one. */
export const shown = (grams: number): number =>
  Math.min(14_000, Math.max(5, Math.round(grams / 5) * 5));

export const asLead = (bench: Bench, input: object): Context =>
  bench.shed.ctx("lead", bench.now, input);
export const asVolunteer = (bench: Bench, input: object): Context =>
  bench.shed.ctx("volunteer", bench.now, input);
export const base = (bench: Bench) => ({ requestId: newId(bench.now) });
export const REASON = "It was read wrongly";

export type Act = (bench: Bench) => void;

export const latest = <Noun extends string>(bench: Bench, table: string, state = "posted") =>
  rows<{ id: Id<Noun> }>(
    bench,
    `select id from ${table} where state = '${state}' order by recorded_at desc, id desc limit 1`,
  )[0]?.id;
export const any = <Noun extends string>(bench: Bench, table: string, state = "posted") =>
  pickRow<{ id: Id<Noun> }>(bench, `select id from ${table} where state = '${state}'`)?.id;

/** Some minutes later: undo is over after ten. */
export function later(now: Instant, random: Random): Instant {
  return instant(Math.max(NOON, now) + (random.chance(0.1) ? 900_000 : 20_000));
}

/** Takes the latest record of a table back. */
export const undoOf =
  <Noun extends string>(
    table: string,
    undo: (ctx: Context, input: { requestId: string; id: Id<Noun> }) => unknown,
    as: (bench: Bench, input: object) => Context = asLead,
  ): Act =>
  (bench) => {
    const id = latest<Noun>(bench, table);
    if (!id) return;
    const input = { ...base(bench), id };
    undo(as(bench, input), input);
  };
