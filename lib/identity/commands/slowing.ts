/** Counting tries. A try is counted before its outcome is known, so that many at once count as many. */
import "server-only";
import { createHmac } from "node:crypto";
import { AppError } from "@/lib/core/errors";
import type { Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Readable, type Tx } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import {
  afterGlobalFailure,
  afterTry,
  globalDelayMs,
  SLOWING,
  waitSeconds,
  type Tries,
} from "../rules/slowing";

type Kind = keyof typeof SLOWING;

/** What is counted: an account or an address, by a keyed hash, so that the table names nobody. */
export type CountedKey = { kind: Kind; key: string };

export function countedKey(kind: Kind, what: string): CountedKey {
  const key = createHmac("sha256", settings().secret).update(`${kind}:${what}`).digest("base64url");
  return { kind, key };
}

const GLOBAL_KEY = "global";

function load(db: Readable, key: string): Tries | null {
  return (prepared(
    db.client,
    `select failures, last_at as lastAt, blocked_until as blockedUntil from sign_in_failures where key = ?`,
  ).get(key) ?? null) as Tries | null;
}

function store(tx: Tx, key: string, tries: Tries): void {
  prepared(
    tx.client,
    `insert into sign_in_failures (key, failures, last_at, blocked_until) values (?, ?, ?, ?)
     on conflict (key) do update set failures = excluded.failures, last_at = excluded.last_at,
       blocked_until = excluded.blocked_until`,
  ).run(key, tries.failures, tries.lastAt, tries.blockedUntil);
}

/**
 * Counts one more try on each key. A try during a wait is refused and not counted, so that waiting helps.
 *
 * @throws AppError `sign-in-slowed` with the seconds to wait
 */
export function countTryIn(tx: Tx, ctx: Context, keys: readonly CountedKey[]): void {
  const known = keys.map((counted) => ({ ...counted, tries: load(tx, counted.key) }));
  const seconds = Math.max(0, ...known.map(({ tries }) => waitSeconds(tries, ctx.now)));
  if (seconds > 0) throw new AppError("sign-in-slowed", { seconds });
  for (const { kind, key, tries } of known) store(tx, key, afterTry(SLOWING[kind], tries, ctx.now));
}

/** Forgets the tries of one account: somebody proved that it is theirs. */
export function clearTriesIn(tx: Tx, counted: CountedKey): void {
  prepared(tx.client, "delete from sign_in_failures where key = ?").run(counted.key);
}

/** Takes back one try of an address whose try was right; the earlier ones stay. */
export function forgiveTryIn(tx: Tx, counted: CountedKey): void {
  prepared(
    tx.client,
    "update sign_in_failures set failures = max(0, failures - 1), blocked_until = 0 where key = ?",
  ).run(counted.key);
}

/** One more failure somewhere in the program. */
export function countGlobalFailure(ctx: Context): void {
  inTransaction(ctx, (tx) =>
    store(tx, GLOBAL_KEY, afterGlobalFailure(load(tx, GLOBAL_KEY), ctx.now)),
  );
}

/** Milliseconds by which every sign-in answers later now. */
export function readGlobalDelay(ctx: Context): number {
  return globalDelayMs(load(ctx.db.reader, GLOBAL_KEY), ctx.now);
}

/** Drops counts that no rule remembers any more. */
export function dropOldTriesIn(tx: Tx, now: number): number {
  const longest = Math.max(...Object.values(SLOWING).map((rule) => rule.forgetMs));
  return prepared(
    tx.client,
    `delete from sign_in_failures where key in
       (select key from sign_in_failures where last_at < ? and blocked_until < ? limit 1000)`,
  ).run(now - longest, now).changes;
}
