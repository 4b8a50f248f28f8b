/** What is asserted when the database opens, and what a migration may not lose. */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import Database from "better-sqlite3";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { openDb } from "@/db/client";
import { applyMigrations, assertTriggers, migrateDatabase, triggerStatements } from "@/db/migrate";
import { AppError } from "@/lib/core/errors";
import { inTransaction } from "@/lib/platform/database";

let folder: string;
beforeEach(() => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-db-"));
});
afterEach(() => fs.rmSync(folder, { recursive: true, force: true }));

const file = (name = "a.db") => path.join(folder, "deeper", name);

describe("opening", () => {
  it("opens lazily, and both connections with every pragma read back", () => {
    const db = openDb(file());
    expect(fs.existsSync(file())).toBe(false);
    expect(db.reader.client.pragma("query_only", { simple: true })).toBe(1);
    for (const connection of [db.writer, db.reader]) {
      const pragma = (name: string): unknown => connection.client.pragma(name, { simple: true });
      expect(pragma("journal_mode")).toBe("wal");
      expect(pragma("synchronous")).toBe(2);
      expect(pragma("foreign_keys")).toBe(1);
      expect(pragma("recursive_triggers")).toBe(1);
      expect(pragma("busy_timeout")).toBe(5000);
    }
    expect(db.writer).toBe(db.writer);
    expect(db.reader).toBe(db.reader);
    db.close();
  });

  it("keeps synchronous FULL after writes and after opening again", () => {
    for (const round of [1, 2]) {
      const db = openDb(file());
      db.writer.client.exec(`create table if not exists t (x); insert into t values (${round})`);
      expect(db.writer.client.pragma("synchronous", { simple: true })).toBe(2);
      db.close();
    }
  });

  it("links SQLite 3.51.3 or newer", () => {
    const client = new Database(":memory:");
    const [major = 0, minor = 0, patch = 0] = String(
      client.prepare("select sqlite_version()").pluck().get(),
    )
      .split(".")
      .map(Number);
    client.close();
    expect(major * 1e6 + minor * 1e3 + patch).toBeGreaterThanOrEqual(3_051_003);
  });
});

describe("inTransaction", () => {
  it("rolls everything back when the work throws", () => {
    const db = openDb(file());
    db.writer.client.exec("create table t (x)");
    expect(() =>
      inTransaction({ db }, (tx) => {
        tx.client.exec("insert into t values (1)");
        throw new AppError("forbidden");
      }),
    ).toThrow(AppError);
    expect(db.reader.client.prepare("select count(*) from t").pluck().get()).toBe(0);
    db.close();
  });

  it("answers busy when another process holds the lock", () => {
    const db = openDb(file());
    db.writer.client.exec("create table t (x)");
    db.writer.client.pragma("busy_timeout = 50");
    const other = new Database(file());
    other.exec("begin immediate");
    expect(() => inTransaction({ db }, () => null)).toThrow(new AppError("busy"));
    other.exec("rollback");
    other.close();
    db.close();
  });
});

describe("migrations", () => {
  it("makes a database once and proves its triggers", () => {
    expect(migrateDatabase(file())).toBeGreaterThan(0);
    expect(migrateDatabase(file())).toBe(0);
    const client = new Database(file());
    expect(() => assertTriggers(client)).not.toThrow();
    client.exec("drop trigger lines_never_updated");
    expect(() => assertTriggers(client)).toThrow(/lines_never_updated/);
    client.close();
    migrateDatabase(file());
    const again = new Database(file());
    expect(() => assertTriggers(again)).not.toThrow();
    again.close();
  });

  it("has no ON DELETE CASCADE", () => {
    migrateDatabase(file());
    const client = new Database(file());
    const sql = client
      .prepare("select group_concat(sql) from sqlite_master")
      .pluck()
      .get() as string;
    client.close();
    expect(sql).not.toMatch(/on delete cascade/i);
  });

  it("rebuilds a table that has children and triggers without losing a row or a trigger", () => {
    migrateDatabase(file());
    const client = new Database(file());
    client.pragma("foreign_keys = ON");
    client.exec(`
      insert into points (id, name, kind, created_at) values ('p', 'P', 'other', 0);
      insert into holders (id, kind, code) values (1, 'bag', 'A'), (2, 'lot', 'B');
      insert into balances values (1, 1, 100), (2, 1, 50);
      insert into parts values (1, 1, 'O', 0, 100), (1, 1, 'H', 0, 100);`);
    const migrations = path.join(folder, "migrations");
    fs.cpSync(path.join(import.meta.dirname, "../../../db/migrations"), migrations, {
      recursive: true,
    });
    addMigration(migrations, [
      "PRAGMA foreign_keys=OFF",
      "CREATE TABLE `__new_holders` (`id` integer PRIMARY KEY NOT NULL, `kind` text NOT NULL, `code` text NOT NULL, `extra` text)",
      "INSERT INTO `__new_holders` (`id`, `kind`, `code`) SELECT `id`, `kind`, `code` FROM `holders`",
      "DROP TABLE `holders`",
      "ALTER TABLE `__new_holders` RENAME TO `holders`",
      "PRAGMA foreign_keys=ON",
    ]);
    expect(applyMigrations(client, migrations)).toBe(1);
    expect(client.prepare("select count(*) from holders").pluck().get()).toBe(2);
    expect(client.prepare("select count(*) from balances").pluck().get()).toBe(2);
    expect(client.prepare("select count(*) from parts").pluck().get()).toBe(2);
    expect(() => client.exec("update holders set code = 'x'")).toThrow(/never changed/);
    expect(() => client.exec("insert into balances values (9, 1, 1)")).toThrow(/FOREIGN KEY/);
    client.close();
  });

  it("refuses, and undoes, a migration that loses rows or breaks references", () => {
    migrateDatabase(file());
    const client = new Database(file());
    client.exec(
      "insert into holders (id, kind, code) values (1, 'bag', 'A'); insert into balances values (1, 1, 5)",
    );
    const migrations = path.join(folder, "migrations");
    fs.cpSync(path.join(import.meta.dirname, "../../../db/migrations"), migrations, {
      recursive: true,
    });
    addMigration(migrations, ["DELETE FROM `balances`", "DELETE FROM `holders`"]);
    expect(() => applyMigrations(client, migrations)).toThrow(/lost 1 rows of holders/);
    expect(client.prepare("select count(*) from holders").pluck().get()).toBe(1);
    expect(() => assertTriggers(client)).not.toThrow();

    const broken = path.join(folder, "broken");
    fs.cpSync(path.join(import.meta.dirname, "../../../db/migrations"), broken, {
      recursive: true,
    });
    addMigration(broken, ["INSERT INTO `balances` VALUES (77, 1, 5)"]);
    expect(() => applyMigrations(client, broken)).toThrow(/broken references/);
    expect(client.prepare("select count(*) from balances").pluck().get()).toBe(1);
    client.close();
  });

  it("reads every trigger of the file", () => {
    const text = fs.readFileSync(
      path.join(import.meta.dirname, "../../../db/triggers.sql"),
      "utf8",
    );
    expect(triggerStatements().size).toBe([...text.matchAll(/^CREATE TRIGGER/gm)].length);
  });
});

/** Adds one migration to a copied folder, as the generator would. */
function addMigration(migrations: string, statements: string[]): void {
  const journal = path.join(migrations, "meta", "_journal.json");
  const content = JSON.parse(fs.readFileSync(journal, "utf8")) as {
    entries: { idx: number; version: string; when: number; tag: string; breakpoints: boolean }[];
  };
  const tag = "9999_test";
  content.entries.push({
    idx: content.entries.length,
    version: "6",
    when: Date.now() + 1000,
    tag,
    breakpoints: true,
  });
  fs.writeFileSync(journal, JSON.stringify(content));
  fs.writeFileSync(
    path.join(migrations, `${tag}.sql`),
    statements.join("\n--> statement-breakpoint\n"),
  );
}
