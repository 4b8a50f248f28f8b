/** The scheme's own settings: its name, its time zone (fixed at the first entry), its first day. */
import "server-only";
import type { Day } from "@/lib/core/time";
import { prepared, type Readable } from "./database";

export type Scheme = { name: string; timeZone: string; firstDay: Day; noteSalt: string };

/** @returns null when the database was never set up (npm run db:migrate and the first set-up do it) */
export function findScheme(db: Readable): Scheme | null {
  return (prepared(
    db.client,
    "select name, time_zone as timeZone, first_day as firstDay, note_salt as noteSalt from scheme where id = 1",
  ).get() ?? null) as Scheme | null;
}

/** @throws Error when the database was never set up */
export function requireScheme(db: Readable): Scheme {
  const scheme = findScheme(db);
  if (!scheme) throw new Error("This database holds no scheme yet.");
  return scheme;
}
