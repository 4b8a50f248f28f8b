/**
 * `npm run set-up -- --name "..." --zone Europe/Lisbon --coordinator "..." --email ...`: a new scheme and
 * its first coordinator. Prints the link with which that person sets a password.
 */
import { randomUUID } from "node:crypto";
import { parseArgs } from "node:util";
import { openDb } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { AppError } from "@/lib/core/errors";
import { sentence } from "@/lib/core/messages";
import { dayOf, isZone, readDay } from "@/lib/core/time";
import { setUpPeopleIn } from "@/lib/identity/commands/add-people";
import { now } from "@/lib/platform/clock";
import type { Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { setUpSchemeIn } from "./set-up-scheme";

const USAGE = `npm run set-up -- --name "Name of the scheme" --zone Area/City --coordinator "Name" --email address
  --zone       time zone of the scheme; days and months rest on it, and it is fixed at the first entry
  --first-day  YYYY-MM-DD, the first day of the ledger (today when left out)
`;

function fail(message: string): never {
  process.stderr.write(`${message}\n\n${USAGE}`);
  process.exit(2);
}

const { values } = parseArgs({
  options: {
    name: { type: "string" },
    zone: { type: "string" },
    coordinator: { type: "string" },
    email: { type: "string" },
    "first-day": { type: "string" },
  },
});
const { name, zone, coordinator, email } = values;
if (!name || !zone || !coordinator || !email) fail("Something is missing.");
if (!isZone(zone)) fail(`${zone} is not a time zone. Write it as Area/City.`);
const startedAt = now();
const firstDay = values["first-day"] ? readDay(values["first-day"]) : dayOf(startedAt, zone);
if (!firstDay) fail(`${values["first-day"] ?? ""} is not a day. Write it as 2026-05-06.`);

const file = settings().databaseFile;
migrateDatabase(file);
const db = openDb(file);
const ctx: Context = {
  actor: { kind: "system" },
  now: startedAt,
  requestId: randomUUID(),
  bodyHash: "",
  address: null,
  db,
};
try {
  const { link } = inTransaction(ctx, (tx) => {
    setUpSchemeIn(tx, ctx, { name, timeZone: zone, firstDay });
    return setUpPeopleIn(tx, ctx, { name: coordinator, email });
  });
  process.stdout.write(
    `${name} is ready. ${coordinator} sets a password here, within a day:\n${link}\n`,
  );
} catch (error) {
  const words =
    error instanceof AppError
      ? sentence(error.code, error.detail)
      : error instanceof Error
        ? error.message
        : String(error);
  process.stderr.write(`${words}\n`);
  process.exitCode = 1;
} finally {
  db.close();
}
