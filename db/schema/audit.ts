/** Who did what to which record. Personal values stand apart, so that they can be emptied. */
import { index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { idColumn, instantColumn, wholeNumbers } from "../columns";

export const auditEvents = sqliteTable(
  "audit_events",
  {
    id: integer("id").primaryKey({ autoIncrement: true }),
    at: instantColumn("at").notNull(),
    /** null: the program itself. */
    actor: idColumn<"person">("actor"),
    action: text("action").notNull(),
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id").notNull(),
    /** JSON object of field names and values that are not personal. */
    fields: text("fields").notNull(),
    /** The ledger's act, where there is one. */
    actId: integer("act_id"),
  },
  (t) => [
    wholeNumbers("audit_events_whole_numbers", t.at, t.actId),
    index("audit_events_subject").on(t.subjectKind, t.subjectId),
    index("audit_events_at").on(t.at),
  ],
);

export const auditValues = sqliteTable(
  "audit_values",
  {
    eventId: integer("event_id")
      .notNull()
      .references(() => auditEvents.id),
    field: text("field").notNull(),
    /** null once erased. */
    value: text("value"),
  },
  (t) => [primaryKey({ columns: [t.eventId, t.field] })],
);

/** A record that was taken back, why, and what stands in its place. */
export const corrections = sqliteTable(
  "corrections",
  {
    /** The request's id. */
    id: idColumn<"correction">("id").primaryKey(),
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id").notNull(),
    /** null: nothing stands in its place. */
    replacementId: text("replacement_id"),
    /** Free text; null once erased. The ledger holds only its salted hash. */
    reason: text("reason"),
    doneBy: idColumn<"person">("done_by").notNull(),
    at: instantColumn("at").notNull(),
    actId: integer("act_id").notNull(),
  },
  (t) => [
    wholeNumbers("corrections_whole_numbers", t.at, t.actId),
    index("corrections_subject").on(t.subjectKind, t.subjectId),
    index("corrections_act").on(t.actId),
  ],
);
