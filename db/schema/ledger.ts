/**
 * The ledger. Entries, lines and parts are only ever added; triggers in the migrations refuse the rest.
 * Balances, parts and totals are kept by lib/ledger in the same transaction and can be rebuilt from lines.
 */
import { sql } from "drizzle-orm";
import {
  check,
  index,
  integer,
  primaryKey,
  sqliteTable,
  text,
  uniqueIndex,
} from "drizzle-orm/sqlite-core";
import { FORMS, KINDS, POLYMER_ANSWERS, WASH_STATES } from "@/lib/core/plastics";
import {
  ACCOUNTS,
  BASES,
  DIMENSIONS,
  ENTRY_KINDS,
  HOLDER_KINDS,
  MEASURES,
  ORIGIN_TYPES,
} from "@/lib/ledger/terms";
import {
  dayColumn,
  gramsColumn,
  idColumn,
  instantColumn,
  monthColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { points } from "./points";

/** What a report counts by. Row 1 is "unsorted", row 2 "reject"; they have no polymer. */
export const rows = sqliteTable(
  "rows",
  {
    id: integer("id").primaryKey(),
    polymer: text("polymer", { enum: POLYMER_ANSWERS }),
    kind: text("kind", { enum: KINDS }),
    colourCode: text("colour_code"),
  },
  (t) => [
    uniqueIndex("rows_content").on(t.polymer, t.kind, t.colourCode),
    check(
      "rows_complete",
      sql`(${t.id} <= 2 and ${t.polymer} is null and ${t.kind} is null and ${t.colourCode} is null) or (${t.id} > 2 and ${t.polymer} is not null and ${t.kind} is not null and ${t.colourCode} is not null)`,
    ),
  ],
);

/** What a lot holds. Materials 1 and 2 are the contents of unsorted bags and of the reject bin. */
export const materials = sqliteTable(
  "materials",
  {
    id: integer("id").primaryKey(),
    rowId: integer("row_id")
      .notNull()
      .references(() => rows.id),
    form: text("form", { enum: FORMS }),
    wash: text("wash", { enum: WASH_STATES }),
  },
  (t) => [uniqueIndex("materials_content").on(t.rowId, t.form, t.wash)],
);

/** Where plastic came from; 0 is unknown. */
export const origins = sqliteTable(
  "origins",
  {
    no: integer("no").primaryKey(),
    type: text("type", { enum: ORIGIN_TYPES }).notNull(),
    pointId: idColumn<"point">("point_id").references(() => points.id),
  },
  (t) => [
    oneOf("origins_type", t.type, ORIGIN_TYPES),
    uniqueIndex("origins_content").on(t.type, t.pointId),
  ],
);

/** Whatever can hold plastic. The code is the holder's label, or REJECT-BIN-1 and so on. */
export const holders = sqliteTable(
  "holders",
  {
    id: integer("id").primaryKey(),
    kind: text("kind", { enum: HOLDER_KINDS }).notNull(),
    code: text("code").notNull().unique(),
  },
  (t) => [
    oneOf("holders_kind", t.kind, HOLDER_KINDS),
    /** What is in work is read without meeting a single bag or lot. */
    index("holders_runs")
      .on(t.id)
      .where(sql`${t.kind} = 'run'`),
  ],
);

export const entries = sqliteTable(
  "entries",
  {
    id: integer("id").primaryKey(),
    /** First entry of the act: entries that were posted together share it. */
    actId: integer("act_id").notNull(),
    kind: text("kind", { enum: ENTRY_KINDS }).notNull(),
    ruleVersion: integer("rule_version").notNull(),
    occurredAt: instantColumn("occurred_at").notNull(),
    bookedDay: dayColumn("booked_day").notNull(),
    concernsDay: dayColumn("concerns_day"),
    recordedAt: instantColumn("recorded_at").notNull(),
    doneBy: text("done_by").notNull(),
    sentBy: text("sent_by").notNull(),
    device: text("device"),
    /** The record that caused it: "weigh-in:<id>". */
    subject: text("subject").notNull(),
    reverses: integer("reverses").unique(),
    noteHash: text("note_hash"),
    lineCount: integer("line_count").notNull(),
    partCount: integer("part_count").notNull(),
    prevHash: text("prev_hash").notNull(),
    hash: text("hash").notNull(),
  },
  (t) => [
    oneOf("entries_kind", t.kind, ENTRY_KINDS),
    check("entries_reversal", sql`(${t.kind} = 'reversal') = (${t.reverses} is not null)`),
    check("entries_day", sql`length(${t.bookedDay}) = 10`),
    wholeNumbers(
      "entries_whole_numbers",
      t.id,
      t.actId,
      t.ruleVersion,
      t.occurredAt,
      t.recordedAt,
      t.reverses,
      t.lineCount,
      t.partCount,
    ),
    index("entries_booked_day").on(t.bookedDay, t.id),
    index("entries_concerns_day")
      .on(t.concernsDay)
      .where(sql`${t.concernsDay} is not null`),
    index("entries_subject").on(t.subject, t.id),
    index("entries_act").on(t.actId, t.id),
  ],
);

export const lines = sqliteTable(
  "lines",
  {
    entryId: integer("entry_id").notNull(),
    seq: integer("seq").notNull(),
    account: text("account", { enum: ACCOUNTS }).notNull(),
    cause: text("cause"),
    holderId: integer("holder_id").references(() => holders.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    grams: gramsColumn("grams").notNull(),
    /** The holder's grams of that material once this line is in. */
    after: gramsColumn("after"),
    basis: text("basis", { enum: BASES }),
    scaleId: integer("scale_id"),
    mpeMilligrams: integer("mpe_mg"),
  },
  (t) => [
    primaryKey({ columns: [t.entryId, t.seq] }),
    oneOf("lines_account", t.account, ACCOUNTS),
    check("lines_not_zero", sql`${t.grams} <> 0`),
    check(
      "lines_holder",
      sql`(${t.account} in ('bag', 'lot', 'run', 'reject-bin', 'pieces')) = (${t.holderId} is not null) and (${t.holderId} is null) = (${t.after} is null)`,
    ),
    wholeNumbers(
      "lines_whole_numbers",
      t.entryId,
      t.seq,
      t.holderId,
      t.materialId,
      t.grams,
      t.after,
      t.scaleId,
      t.mpeMilligrams,
    ),
    index("lines_holder")
      .on(t.holderId, t.entryId)
      .where(sql`${t.holderId} is not null`),
    index("lines_runs")
      .on(t.entryId, t.grams)
      .where(sql`${t.account} = 'run'`),
  ],
);

export const lineParts = sqliteTable(
  "line_parts",
  {
    entryId: integer("entry_id").notNull(),
    seq: integer("seq").notNull(),
    dim: text("dim", { enum: DIMENSIONS }).notNull(),
    key: integer("key").notNull(),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.entryId, t.seq, t.dim, t.key] }),
    oneOf("line_parts_dim", t.dim, DIMENSIONS),
    check("line_parts_not_zero", sql`${t.grams} <> 0`),
    check("line_parts_key", sql`${t.key} >= 0 and (${t.dim} = 'O' or ${t.key} <= 3)`),
    wholeNumbers("line_parts_whole_numbers", t.entryId, t.seq, t.key, t.grams),
  ],
);

export const balances = sqliteTable(
  "balances",
  {
    holderId: integer("holder_id")
      .notNull()
      .references(() => holders.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.holderId, t.materialId] }),
    check("balances_not_negative", sql`${t.grams} >= 0`),
    wholeNumbers("balances_whole_numbers", t.holderId, t.materialId, t.grams),
    /** Stock is read from this index: empty lots and sorted bags cost nothing. */
    index("balances_held")
      .on(t.materialId, t.holderId, t.grams)
      .where(sql`${t.grams} > 0`),
  ],
);

export const parts = sqliteTable(
  "parts",
  {
    holderId: integer("holder_id")
      .notNull()
      .references(() => holders.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    dim: text("dim", { enum: DIMENSIONS }).notNull(),
    key: integer("key").notNull(),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.holderId, t.materialId, t.dim, t.key] }),
    check("parts_not_negative", sql`${t.grams} > 0`),
    wholeNumbers("parts_whole_numbers", t.holderId, t.materialId, t.key, t.grams),
  ],
);

/** The columns of a day's and of a month's totals, in the order in which they are written. */
const totalsColumns = () => ({
  held: integer("held").notNull(),
  collected: integer("collected").notNull(),
  otherIn: integer("other_in").notNull(),
  opening: integer("opening").notNull(),
  disposed: integer("disposed").notNull(),
  passedProven: integer("passed_proven").notNull(),
  passedUnproven: integer("passed_unproven").notNull(),
  loss: integer("loss").notNull(),
  difference: integer("difference").notNull(),
  pieces: integer("pieces").notNull(),
  accepted: integer("accepted").notNull(),
  rejected: integer("rejected").notNull(),
  bags: integer("bags").notNull(),
  beforeOpening: integer("before_opening").notNull(),
});

export const totalsDay = sqliteTable(
  "totals_day",
  {
    day: dayColumn("day").notNull(),
    rowId: integer("row_id")
      .notNull()
      .references(() => rows.id),
    originNo: integer("origin_no")
      .notNull()
      .references(() => origins.no),
    ...totalsColumns(),
  },
  (t) => [primaryKey({ columns: [t.day, t.rowId, t.originNo] })],
);

export const totalsMonth = sqliteTable(
  "totals_month",
  {
    month: monthColumn("month").notNull(),
    rowId: integer("row_id")
      .notNull()
      .references(() => rows.id),
    originNo: integer("origin_no")
      .notNull()
      .references(() => origins.no),
    ...totalsColumns(),
  },
  (t) => [primaryKey({ columns: [t.month, t.rowId, t.originNo] })],
);

/** Kilograms by basis, and the sum of the errors that a scale may have, for ± 2 u beside a report. */
export const totalsScale = sqliteTable(
  "totals_scale",
  {
    month: monthColumn("month").notNull(),
    measure: text("measure", { enum: MEASURES }).notNull(),
    basis: text("basis", { enum: BASES }).notNull(),
    /** 0: no scale (estimated, imported, stated). */
    scaleId: integer("scale_id").notNull(),
    grams: integer("grams").notNull(),
    mpeMilligrams: integer("mpe_mg").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.month, t.measure, t.basis, t.scaleId] }),
    wholeNumbers("totals_scale_whole_numbers", t.scaleId, t.grams, t.mpeMilligrams),
  ],
);

/** A month with a row here is closed. Months close in order. */
export const periods = sqliteTable("periods", {
  month: monthColumn("month").primaryKey(),
  closedEntry: integer("closed_entry").notNull(),
  headHash: text("head_hash").notNull(),
  snapshot: text("snapshot").notNull(),
  closedBy: text("closed_by").notNull(),
});
