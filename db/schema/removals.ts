/** What left the shed: disposed of, or passed on to another recycler, and the receipts that prove it. */
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
import { BASES } from "@/lib/ledger/terms";
import { REMOVAL_SOURCES, ROUTES } from "@/lib/removals/terms";
import { RECORD_STATES } from "@/lib/stock/terms";
import {
  dayColumn,
  gramsColumn,
  idColumn,
  instantColumn,
  milligramsColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { people } from "./identity";
import { scales } from "./scales";
import { lots } from "./stock";

/** Carriers and receivers: firms, with the numbers under which they are registered. */
export const destinations = sqliteTable(
  "destinations",
  {
    id: idColumn<"destination">("id").primaryKey(),
    name: text("name").notNull().unique(),
    route: text("route", { enum: ROUTES }).notNull(),
    /** Receiver's registration or permit number; empty where none is needed. */
    receiverNumber: text("receiver_number").notNull(),
    carrierName: text("carrier_name").notNull(),
    carrierNumber: text("carrier_number").notNull(),
    /** Last day on which the receiver's or carrier's permit is good. */
    permitUntil: dayColumn("permit_until"),
    /** Six digits of the List of Waste, Decision 2000/532/EC: "20 01 39"; set by the coordinator. */
    wasteCode: text("waste_code").notNull(),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("destinations_route", t.route, ROUTES),
    wholeNumbers("destinations_whole_numbers", t.createdAt, t.retiredAt),
  ],
);

export const removals = sqliteTable(
  "removals",
  {
    /** The request's id. */
    id: idColumn<"removal">("id").primaryKey(),
    source: text("source", { enum: REMOVAL_SOURCES }).notNull(),
    route: text("route", { enum: ROUTES }).notNull(),
    destinationId: idColumn<"destination">("destination_id")
      .notNull()
      .references(() => destinations.id),
    /** As they were then: a destination may be changed later. */
    receiverName: text("receiver_name").notNull(),
    receiverNumber: text("receiver_number").notNull(),
    carrierName: text("carrier_name").notNull(),
    carrierNumber: text("carrier_number").notNull(),
    wasteCode: text("waste_code").notNull(),
    /** Transfer note or ticket of the carrier. */
    noteNumber: text("note_number").notNull(),
    grams: gramsColumn("grams").notNull(),
    /** More or less than the book held, posted as difference in the same entry. */
    differenceGrams: gramsColumn("difference_grams").notNull(),
    basis: text("basis", { enum: BASES }).notNull(),
    scaleId: idColumn<"scale">("scale_id").references(() => scales.id),
    grossMilligrams: milligramsColumn("gross_mg"),
    tareMilligrams: milligramsColumn("tare_mg"),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
    state: text("state", { enum: RECORD_STATES }).notNull(),
    /** The removal in whose place it stands. */
    corrects: idColumn<"removal">("corrects"),
    actId: integer("act_id").notNull(),
    undoneActId: integer("undone_act_id"),
  },
  (t) => [
    oneOf("removals_source", t.source, REMOVAL_SOURCES),
    oneOf("removals_route", t.route, ROUTES),
    oneOf("removals_state", t.state, RECORD_STATES),
    oneOf("removals_basis", t.basis, BASES),
    check("removals_grams", sql`${t.grams} > 0`),
    wholeNumbers(
      "removals_whole_numbers",
      t.grams,
      t.differenceGrams,
      t.grossMilligrams,
      t.tareMilligrams,
      t.occurredAt,
      t.recordedAt,
      t.actId,
      t.undoneActId,
    ),
    index("removals_recorded").on(t.recordedAt),
  ],
);

export const removalLots = sqliteTable(
  "removal_lots",
  {
    removalId: idColumn<"removal">("removal_id")
      .notNull()
      .references(() => removals.id),
    lotId: idColumn<"lot">("lot_id")
      .notNull()
      .references(() => lots.id),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.removalId, t.lotId] }),
    check("removal_lots_grams", sql`${t.grams} > 0`),
    wholeNumbers("removal_lots_whole_numbers", t.grams),
    index("removal_lots_lot").on(t.lotId),
  ],
);

/** The receiver's receipt: what was passed on is proven from its day. */
export const removalReceipts = sqliteTable(
  "removal_receipts",
  {
    id: idColumn<"removal-receipt">("id").primaryKey(),
    removalId: idColumn<"removal">("removal_id")
      .notNull()
      .references(() => removals.id),
    number: text("number").notNull(),
    /** What the receiver says that it weighed. */
    receivedGrams: gramsColumn("received_grams").notNull(),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
    state: text("state", { enum: RECORD_STATES }).notNull(),
    actId: integer("act_id").notNull(),
    undoneActId: integer("undone_act_id"),
  },
  (t) => [
    oneOf("removal_receipts_state", t.state, RECORD_STATES),
    check("removal_receipts_grams", sql`${t.receivedGrams} > 0`),
    wholeNumbers(
      "removal_receipts_whole_numbers",
      t.receivedGrams,
      t.occurredAt,
      t.recordedAt,
      t.actId,
      t.undoneActId,
    ),
    uniqueIndex("removal_receipts_one_live")
      .on(t.removalId)
      .where(sql`${t.state} = 'posted'`),
  ],
);
