/** The scheme itself, its sites, receipts of requests, leases of jobs. */
import { sql } from "drizzle-orm";
import { check, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { dayColumn, instantColumn, wholeNumbers } from "../columns";

/** One row: one database is one scheme. */
export const scheme = sqliteTable(
  "scheme",
  {
    id: integer("id").primaryKey(),
    name: text("name").notNull(),
    timeZone: text("time_zone").notNull(),
    /** The scheme's first day: opening counts are possible on this day only. */
    firstDay: dayColumn("first_day").notNull(),
    /** Secret prefix of every note's hash in the ledger, so that a short note cannot be guessed from it. */
    noteSalt: text("note_salt").notNull(),
    createdAt: instantColumn("created_at").notNull(),
  },
  (t) => [
    check("scheme_one_row", sql`${t.id} = 1`),
    wholeNumbers("scheme_whole_numbers", t.createdAt),
  ],
);

/** What a coordinator sets for the whole scheme. One row. */
export const schemeLimits = sqliteTable(
  "scheme_limits",
  {
    id: integer("id").primaryKey(),
    /** A lot closes when it has been open so long; null: never by age. */
    lotWeeks: integer("lot_weeks"),
    /** Fire and permit limits of what may lie in the shed; null: none set. */
    storageGrams: integer("storage_grams"),
    storageDays: integer("storage_days"),
    /** A reservation lapses after so many days. */
    reservationDays: integer("reservation_days").notNull().default(14),
  },
  (t) => [
    check("scheme_limits_one_row", sql`${t.id} = 1`),
    wholeNumbers(
      "scheme_limits_whole_numbers",
      t.lotWeeks,
      t.storageGrams,
      t.storageDays,
      t.reservationDays,
    ),
  ],
);

export const sites = sqliteTable("sites", {
  id: integer("id").primaryKey(),
  name: text("name").notNull().unique(),
});

/** What a command answered; kept for good, so that the same request twice gives the same answer. */
export const receipts = sqliteTable(
  "receipts",
  {
    requestId: text("request_id").primaryKey(),
    sender: text("sender").notNull(),
    endpoint: text("endpoint").notNull(),
    bodyHash: text("body_hash").notNull(),
    answer: text("answer").notNull(),
    at: instantColumn("at").notNull(),
  },
  (t) => [wholeNumbers("receipts_whole_numbers", t.at)],
);

/** A job runs in one process at a time: who holds the lease, and until when. */
export const jobLeases = sqliteTable(
  "job_leases",
  {
    name: text("name").primaryKey(),
    holder: text("holder").notNull(),
    until: instantColumn("until").notNull(),
    lastFinishedAt: instantColumn("last_finished_at"),
    lastResult: text("last_result"),
  },
  (t) => [wholeNumbers("job_leases_whole_numbers", t.until, t.lastFinishedAt)],
);
