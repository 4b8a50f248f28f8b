/**
 * The database: one writer and one query_only reader per process, opened at first use.
 *
 * Every pragma that the ledger's promises rest on is set and then read back, because the build's
 * defaults differ from SQLite's own (synchronous drops to NORMAL) and some pragmas fail silently.
 */
import fs from "node:fs";
import path from "node:path";
import Database from "better-sqlite3";
import { drizzle, type BetterSQLite3Database } from "drizzle-orm/better-sqlite3";

export type Orm = BetterSQLite3Database<Record<string, never>>;
export type Connection = { client: Database.Database; orm: Orm };
export type Db = {
  readonly file: string;
  /** For queries: refuses every write. */
  readonly reader: Connection;
  /** For lib/platform's inTransaction only. */
  readonly writer: Connection;
  close(): void;
};

const LEAST_SQLITE = [3, 51, 3] as const;
const BUSY_MS = 5000;

/** @throws Error when the linked SQLite is older than the one that fixed the WAL reset bug */
function assertVersion(client: Database.Database): void {
  const version = String(client.prepare("select sqlite_version()").pluck().get());
  const found = version.split(".").map(Number);
  for (let place = 0; place < LEAST_SQLITE.length; place += 1) {
    const difference = (found[place] ?? 0) - (LEAST_SQLITE[place] ?? 0);
    if (difference > 0) return;
    if (difference < 0) {
      throw new Error(
        `SQLite ${version} is too old: ${LEAST_SQLITE.join(".")} or newer is needed.`,
      );
    }
  }
}

function assertPragma(client: Database.Database, name: string, expected: number | string): void {
  const found: unknown = client.pragma(name, { simple: true });
  if (found !== expected) {
    throw new Error(
      `PRAGMA ${name} is ${String(found)} instead of ${expected}; the database is not used.`,
    );
  }
}

/** Opens one connection with everything asserted. */
export function openConnection(file: string, mode: "writer" | "reader"): Connection {
  const client = new Database(file, { timeout: BUSY_MS });
  try {
    assertVersion(client);
    client.pragma("journal_mode = WAL");
    client.pragma("synchronous = FULL");
    client.pragma("foreign_keys = ON");
    client.pragma("recursive_triggers = ON");
    client.pragma("temp_store = MEMORY");
    client.pragma("cache_size = -32000");
    if (mode === "reader") client.pragma("query_only = ON");
    assertPragma(client, "journal_mode", "wal");
    assertPragma(client, "synchronous", 2);
    assertPragma(client, "foreign_keys", 1);
    assertPragma(client, "recursive_triggers", 1);
    assertPragma(client, "busy_timeout", BUSY_MS);
    assertPragma(client, "query_only", mode === "reader" ? 1 : 0);
  } catch (error) {
    client.close();
    throw error;
  }
  return { client, orm: drizzle(client) };
}

/**
 * Opens a database file, making its folder. Both connections open at first use, the writer before the
 * reader so that a new file is in WAL mode before anybody reads it.
 */
export function openDb(file: string): Db {
  let writer: Connection | undefined;
  let reader: Connection | undefined;
  const openWriter = (): Connection => {
    if (!writer) {
      fs.mkdirSync(path.dirname(file), { recursive: true });
      writer = openConnection(file, "writer");
    }
    return writer;
  };
  return {
    file,
    get writer() {
      return openWriter();
    },
    get reader() {
      if (!reader) {
        openWriter();
        reader = openConnection(file, "reader");
      }
      return reader;
    },
    close() {
      reader?.client.close();
      writer?.client.close();
      reader = undefined;
      writer = undefined;
    },
  };
}
