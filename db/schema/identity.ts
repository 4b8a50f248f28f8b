/** People, their sessions, their mailed links, and what slows down guessing. */
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { ROLES } from "@/lib/core/permissions";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";

/** A person's row is blanked, never deleted: the ledger keeps the id. */
export const people = sqliteTable(
  "people",
  {
    id: idColumn<"person">("id").primaryKey(),
    name: text("name").notNull(),
    /** In lower case; null once blanked. */
    email: text("email").unique(),
    role: text("role", { enum: ROLES }).notNull(),
    locale: text("locale").notNull().default("en"),
    passwordHash: text("password_hash"),
    invitedAt: instantColumn("invited_at").notNull(),
    joinedAt: instantColumn("joined_at"),
    removedAt: instantColumn("removed_at"),
  },
  (t) => [
    oneOf("people_role", t.role, ROLES),
    wholeNumbers("people_whole_numbers", t.invitedAt, t.joinedAt, t.removedAt),
  ],
);

export const sessions = sqliteTable(
  "sessions",
  {
    id: idColumn<"session">("id").primaryKey(),
    personId: idColumn<"person">("person_id")
      .notNull()
      .references(() => people.id),
    createdAt: instantColumn("created_at").notNull(),
    expiresAt: instantColumn("expires_at").notNull(),
    endedAt: instantColumn("ended_at"),
  },
  (t) => [
    wholeNumbers("sessions_whole_numbers", t.createdAt, t.expiresAt, t.endedAt),
    index("sessions_person").on(t.personId),
  ],
);

/** A link that works once and for a day; only the hash of its token is here. */
export const accountLinks = sqliteTable(
  "account_links",
  {
    tokenHash: text("token_hash").primaryKey(),
    personId: idColumn<"person">("person_id")
      .notNull()
      .references(() => people.id),
    purpose: text("purpose", { enum: ["invite", "reset"] }).notNull(),
    createdAt: instantColumn("created_at").notNull(),
    expiresAt: instantColumn("expires_at").notNull(),
    usedAt: instantColumn("used_at"),
  },
  (t) => [
    wholeNumbers("account_links_whole_numbers", t.createdAt, t.expiresAt, t.usedAt),
    index("account_links_person").on(t.personId),
  ],
);

/** Failures by account and by address; keys are hashes. */
export const signInFailures = sqliteTable(
  "sign_in_failures",
  {
    key: text("key").primaryKey(),
    failures: integer("failures").notNull(),
    lastAt: instantColumn("last_at").notNull(),
    blockedUntil: instantColumn("blocked_until").notNull(),
  },
  (t) => [wholeNumbers("sign_in_failures_whole_numbers", t.failures, t.lastAt, t.blockedUntil)],
);
