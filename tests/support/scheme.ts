/** A scheme of its own for one test: a copy of the migrated template, with people of every role. */
import { createHash, randomUUID } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { openDb, type Db } from "@/db/client";
import { newId, type PersonId } from "@/lib/core/ids";
import { ROLES, type Role } from "@/lib/core/permissions";
import { instant, type Instant } from "@/lib/core/time";
import type { Context } from "@/lib/platform/context";

/** 6 May 2026, noon in the scheme's zone (UTC in tests). */
export const NOON = instant(Date.UTC(2026, 4, 6, 12));

export type TestScheme = {
  db: Db;
  people: Record<Role, PersonId>;
  /** A context of one role, "nobody" or "system". */
  ctx: (who?: Role | "nobody" | "system", now?: Instant, body?: unknown) => Context;
  close: () => void;
};

/** Opens a fresh copy. Close it at the end of the test. */
export function newScheme(options: { timeZone?: string; firstDay?: string } = {}): TestScheme {
  const template = process.env.BISMAR_TEST_TEMPLATE;
  const folder = process.env.BISMAR_TEST_FOLDER;
  if (!template || !folder)
    throw new Error("No template database: run through the integration project.");
  const file = path.join(folder, `${randomUUID()}.db`);
  fs.copyFileSync(template, file);
  const db = openDb(file);
  const writer = db.writer.client;
  writer
    .prepare(
      "insert into scheme (id, name, time_zone, first_day, note_salt, created_at) values (1, 'Saltmarsh Plastics Shed', ?, ?, 'test-salt', ?)",
    )
    .run(options.timeZone ?? "UTC", options.firstDay ?? "2026-01-01", NOON);
  const people = Object.fromEntries(ROLES.map((role) => [role, newId<"person">(NOON)])) as Record<
    Role,
    PersonId
  >;
  for (const role of ROLES) {
    writer
      .prepare(
        "insert into people (id, name, email, role, invited_at, joined_at) values (?, ?, ?, ?, ?, ?)",
      )
      .run(people[role], `Test ${role}`, `${role}@saltmarsh.example`, role, NOON, NOON);
  }
  return {
    db,
    people,
    ctx: (who = "coordinator", now = NOON, body = null) => ({
      actor:
        who === "nobody" || who === "system"
          ? { kind: who }
          : { kind: "person", id: people[who], role: who, sessionId: null },
      now,
      requestId: randomUUID(),
      bodyHash: createHash("sha256").update(JSON.stringify(body)).digest("hex"),
      address: null,
      db,
    }),
    close: () => {
      db.close();
      for (const suffix of ["", "-wal", "-shm"]) fs.rmSync(file + suffix, { force: true });
    },
  };
}
