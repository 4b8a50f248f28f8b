/**
 * Migrations, run before the server starts. Foreign keys go off outside the transaction (inside it the
 * pragma is ignored), everything is checked inside it, and nothing is committed that fails a check.
 */
import fs from "node:fs";
import path from "node:path";
import type Database from "better-sqlite3";
import { readMigrationFiles } from "drizzle-orm/migrator";
import { openConnection } from "./client";

const FOLDER = path.join(import.meta.dirname, "migrations");
const TRIGGERS = path.join(import.meta.dirname, "triggers.sql");

/** Tables whose rows a migration may never make fewer. */
const KEPT_TABLES = [
  "entries",
  "lines",
  "line_parts",
  "rows",
  "materials",
  "origins",
  "holders",
  "receipts",
  "audit_events",
] as const;

/** The statements of triggers.sql by the trigger's name. */
export function triggerStatements(file: string = TRIGGERS): Map<string, string> {
  const text = fs.readFileSync(file, "utf8").replace(/^--.*$/gm, "");
  const found = new Map<string, string>();
  for (const match of text.matchAll(/CREATE TRIGGER (\w+)[\s\S]*?\bEND;/g)) {
    found.set(match[1] ?? "", match[0].slice(0, -1));
  }
  return found;
}

function names(client: Database.Database, type: "table" | "trigger"): string[] {
  return client
    .prepare("select name from sqlite_master where type = ? order by name")
    .pluck()
    .all(type) as string[];
}

function counts(client: Database.Database): Map<string, number> {
  const present = new Set(names(client, "table"));
  return new Map(
    KEPT_TABLES.filter((table) => present.has(table)).map((table) => [
      table,
      client.prepare(`select count(*) from "${table}"`).pluck().get() as number,
    ]),
  );
}

/** Drops every trigger and makes those of triggers.sql; throws when the database then differs from the file. */
function remakeTriggers(client: Database.Database, wanted: Map<string, string>): void {
  for (const name of names(client, "trigger")) client.exec(`DROP TRIGGER "${name}"`);
  for (const statement of wanted.values()) client.exec(statement);
  assertTriggers(client, wanted);
}

/** @throws Error naming the first trigger that is missing or differs from triggers.sql */
export function assertTriggers(client: Database.Database, wanted = triggerStatements()): void {
  const sqlOf = client.prepare("select sql from sqlite_master where type = 'trigger' and name = ?");
  for (const [name, statement] of wanted) {
    if (sqlOf.pluck().get(name) !== statement) {
      throw new Error(`The database's trigger ${name} is missing or differs from db/triggers.sql.`);
    }
  }
}

/** Applies what is missing and proves the result; one transaction. */
export function applyMigrations(
  client: Database.Database,
  folder: string = FOLDER,
  triggers: Map<string, string> = triggerStatements(),
): number {
  client.pragma("foreign_keys = OFF");
  try {
    return client
      .transaction(() => {
        client.exec(
          "CREATE TABLE IF NOT EXISTS __drizzle_migrations (id INTEGER PRIMARY KEY, hash text NOT NULL, created_at numeric)",
        );
        const last = (client
          .prepare("select max(created_at) from __drizzle_migrations")
          .pluck()
          .get() ?? 0) as number;
        const before = counts(client);
        const missing = readMigrationFiles({ migrationsFolder: folder }).filter(
          (migration) => migration.folderMillis > last,
        );
        // Append-only triggers would refuse the copying of a table rebuild; they come back below.
        if (missing.length > 0) {
          for (const name of names(client, "trigger")) client.exec(`DROP TRIGGER "${name}"`);
        }
        for (const migration of missing) {
          for (const statement of migration.sql) client.exec(statement);
          client
            .prepare("insert into __drizzle_migrations (hash, created_at) values (?, ?)")
            .run(migration.hash, migration.folderMillis);
        }
        remakeTriggers(client, triggers);
        const broken = client.pragma("foreign_key_check") as { table: string }[];
        if (broken.length > 0) {
          throw new Error(
            `A migration left ${broken.length} broken references, first in ${broken[0]?.table}.`,
          );
        }
        const after = counts(client);
        for (const [table, count] of before) {
          const now = after.get(table) ?? 0;
          if (now < count) throw new Error(`A migration lost ${count - now} rows of ${table}.`);
        }
        return missing.length;
      })
      .immediate();
  } finally {
    client.pragma("foreign_keys = ON");
  }
}

/**
 * Brings a database file up to date. A file that already holds something is copied beside itself first
 * when there is something to apply.
 *
 * @returns how many migrations were applied
 */
export function migrateDatabase(file: string): number {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  const existed = fs.existsSync(file);
  const { client } = openConnection(file, "writer");
  try {
    if (existed && pending(client)) {
      const copy = `${file}.before-${new Date().toISOString().slice(0, 19).replace(/[:T]/g, "-")}`;
      client.prepare("VACUUM INTO ?").run(copy);
    }
    return applyMigrations(client);
  } finally {
    client.close();
  }
}

function pending(client: Database.Database): boolean {
  if (!names(client, "table").includes("__drizzle_migrations")) return false;
  const last = client
    .prepare("select max(created_at) from __drizzle_migrations")
    .pluck()
    .get() as number;
  return readMigrationFiles({ migrationsFolder: FOLDER }).some((file) => file.folderMillis > last);
}
