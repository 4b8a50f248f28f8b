/** Sorting sessions: which bags were tipped, and into which piles and rejects they went. */
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
import { LOSS_CAUSES } from "@/lib/ledger/terms";
import { SORTING_STATES } from "@/lib/sorting/terms";
import {
  gramsColumn,
  idColumn,
  instantColumn,
  milligramsColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { bags } from "./bags";
import { people } from "./identity";
import { materials } from "./ledger";
import { scales } from "./scales";
import { lots } from "./stock";

export const rejectReasons = sqliteTable(
  "reject_reasons",
  {
    code: text("code").primaryKey(),
    name: text("name").notNull().unique(),
    /** Shows "Stop, gloves, set aside". */
    warning: integer("warning", { mode: "boolean" }).notNull(),
    position: integer("position").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [wholeNumbers("reject_reasons_whole_numbers", t.position, t.retiredAt)],
);

export const sortingSessions = sqliteTable(
  "sorting_sessions",
  {
    id: idColumn<"sorting">("id").primaryKey(),
    state: text("state", { enum: SORTING_STATES }).notNull(),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
    netGrams: gramsColumn("net_grams").notNull(),
    /** Net less the sum of piles and rejects. */
    differenceGrams: gramsColumn("difference_grams").notNull(),
    toleranceMilligrams: milligramsColumn("tolerance_mg").notNull(),
    /** Named when the difference is beyond tolerance; it is then a loss. */
    cause: text("cause", { enum: LOSS_CAUSES }),
    actId: integer("act_id").notNull(),
    undoneActId: integer("undone_act_id"),
  },
  (t) => [
    oneOf("sorting_sessions_state", t.state, SORTING_STATES),
    wholeNumbers(
      "sorting_sessions_whole_numbers",
      t.netGrams,
      t.differenceGrams,
      t.toleranceMilligrams,
      t.occurredAt,
      t.recordedAt,
      t.actId,
      t.undoneActId,
    ),
    index("sorting_sessions_recorded").on(t.recordedAt),
  ],
);

export const sortingBags = sqliteTable(
  "sorting_bags",
  {
    sessionId: idColumn<"sorting">("session_id")
      .notNull()
      .references(() => sortingSessions.id),
    bagId: idColumn<"bag">("bag_id")
      .notNull()
      .references(() => bags.id),
    /** False once the session is undone. */
    live: integer("live", { mode: "boolean" }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.sessionId, t.bagId] }),
    uniqueIndex("sorting_bags_one_live")
      .on(t.bagId)
      .where(sql`${t.live} = 1`),
  ],
);

/** A pile of a session, or a reject: a pile has a lot, a reject has a reason. */
export const fractions = sqliteTable(
  "fractions",
  {
    sessionId: idColumn<"sorting">("session_id")
      .notNull()
      .references(() => sortingSessions.id),
    seq: integer("seq").notNull(),
    lotId: idColumn<"lot">("lot_id").references(() => lots.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    rejectReason: text("reject_reason").references(() => rejectReasons.code),
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    grossMilligrams: milligramsColumn("gross_mg").notNull(),
    tareMilligrams: milligramsColumn("tare_mg").notNull(),
    netGrams: gramsColumn("net_grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.sessionId, t.seq] }),
    check("fractions_pile_or_reject", sql`(${t.lotId} is null) = (${t.rejectReason} is not null)`),
    check("fractions_net", sql`${t.netGrams} > 0`),
    wholeNumbers("fractions_whole_numbers", t.seq, t.grossMilligrams, t.tareMilligrams, t.netGrams),
    index("fractions_lot").on(t.lotId),
  ],
);
