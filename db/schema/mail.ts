/** Mail waits here, written in the transaction that causes it; the body is emptied once it is sent. */
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { instantColumn, wholeNumbers } from "../columns";

export const outbox = sqliteTable(
  "outbox",
  {
    id: integer("id").primaryKey({ autoIncrement: true }),
    toAddress: text("to_address").notNull(),
    subject: text("subject").notNull(),
    body: text("body").notNull(),
    createdAt: instantColumn("created_at").notNull(),
    sentAt: instantColumn("sent_at"),
    attempts: integer("attempts").notNull().default(0),
    nextAttemptAt: instantColumn("next_attempt_at").notNull(),
    lastError: text("last_error"),
  },
  (t) => [
    wholeNumbers("outbox_whole_numbers", t.createdAt, t.sentAt, t.attempts, t.nextAttemptAt),
    index("outbox_waiting").on(t.sentAt, t.nextAttemptAt),
  ],
);
