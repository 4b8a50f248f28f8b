/** The process's one database, and the one way to write to it. */
import "server-only";
import type Database from "better-sqlite3";
import { openDb, type Connection, type Db, type Orm } from "@/db/client";
import { AppError } from "@/lib/core/errors";
import type { Context } from "./context";
import { settings } from "./env";

const held = globalThis as unknown as { bismarDb?: Db };

/** One writer and one reader per process, also under hot reload. */
export function database(): Db {
  held.bismarDb ??= openDb(settings().databaseFile);
  return held.bismarDb;
}

declare const txBrand: unique symbol;
/** A write transaction under way. Only {@link inTransaction} makes one. */
export type Tx = Connection & { readonly [txBrand]: true };
/** What a query function needs: the reader, or a transaction that reads its own writes. */
export type Readable = { client: Database.Database; orm: Orm };

type NotPromise<T> = T extends PromiseLike<unknown> ? never : T;

/**
 * Runs a synchronous function in one immediate write transaction; a throw rolls everything back.
 * The type refuses a promise: better-sqlite3 would commit before it settles.
 *
 * @throws AppError `busy` when another process kept the database locked for five seconds
 */
export function inTransaction<T>(ctx: Pick<Context, "db">, work: (tx: Tx) => NotPromise<T>): T {
  const writer = ctx.db.writer;
  try {
    return writer.client.transaction(() => work(writer as Tx)).immediate();
  } catch (error) {
    if (error instanceof Error && "code" in error && String(error.code).startsWith("SQLITE_BUSY")) {
      throw new AppError("busy");
    }
    throw error;
  }
}

/** Runs the reads of one page on one state of the database. */
export function inSnapshot<T>(ctx: Pick<Context, "db">, work: (db: Readable) => NotPromise<T>): T {
  return onOneState(ctx.db.reader, work);
}

/** The same for a connection of one's own, in a worker thread. */
export function onOneState<T>(db: Readable, work: (db: Readable) => NotPromise<T>): T {
  if (db.client.inTransaction) return work(db);
  return db.client.transaction(() => work(db)).deferred();
}

const statements = new WeakMap<Database.Database, Map<string, Database.Statement>>();

/** A statement prepared once per connection: the hot paths of ledger and totals use it. */
export function prepared(client: Database.Database, sql: string): Database.Statement<unknown[]> {
  let known = statements.get(client);
  if (!known) {
    known = new Map();
    statements.set(client, known);
  }
  let statement = known.get(sql);
  if (!statement) {
    statement = client.prepare(sql);
    known.set(sql, statement);
  }
  return statement;
}
