/** Weigh-ins: the record of the weigh ticket. Grams are in the ledger; here are the readings behind them. */
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
import { KINDS, POLYMER_ANSWERS } from "@/lib/core/plastics";
import { BASES } from "@/lib/ledger/terms";
import { CONDITIONS, WEIGH_IN_STATES } from "@/lib/weighing/terms";
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
import { points } from "./points";
import { containers, scales } from "./scales";

export const weighIns = sqliteTable(
  "weigh_ins",
  {
    /** The request's id, made by the client. */
    id: idColumn<"weigh-in">("id").primaryKey(),
    bagId: idColumn<"bag">("bag_id")
      .notNull()
      .references(() => bags.id),
    pointId: idColumn<"point">("point_id")
      .notNull()
      .references(() => points.id),
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
    state: text("state", { enum: WEIGH_IN_STATES }).notNull(),
    netGrams: gramsColumn("net_grams").notNull(),
    /** Sum of the errors that the readings may have. */
    mpeMilligrams: milligramsColumn("mpe_mg").notNull(),
    basis: text("basis", { enum: BASES }).notNull(),
    /** A reading under the scale's minimum capacity is accepted and marked. */
    belowMinimum: integer("below_minimum", { mode: "boolean" }).notNull(),
    condition: text("condition", { enum: CONDITIONS }).notNull(),
    /** A guess at weigh-in, never a figure of a report. */
    polymer: text("polymer", { enum: POLYMER_ANSWERS }).notNull(),
    kind: text("kind", { enum: KINDS }),
    colourCode: text("colour_code"),
    oneKind: integer("one_kind", { mode: "boolean" }).notNull(),
    lotId: idColumn<"lot">("lot_id"),
    actId: integer("act_id"),
    undoneActId: integer("undone_act_id"),
    /** The weigh-in in whose place it stands. */
    corrects: idColumn<"weigh-in">("corrects"),
    /** Who accepted or discarded a second reading. */
    reviewedBy: idColumn<"person">("reviewed_by").references(() => people.id),
    reviewedAt: instantColumn("reviewed_at"),
  },
  (t) => [
    oneOf("weigh_ins_state", t.state, WEIGH_IN_STATES),
    oneOf("weigh_ins_condition", t.condition, CONDITIONS),
    check("weigh_ins_net", sql`${t.netGrams} > 0`),
    check(
      "weigh_ins_act",
      sql`(${t.state} in ('posted', 'undone', 'corrected')) = (${t.actId} is not null)`,
    ),
    wholeNumbers(
      "weigh_ins_whole_numbers",
      t.netGrams,
      t.mpeMilligrams,
      t.occurredAt,
      t.recordedAt,
      t.actId,
      t.undoneActId,
      t.reviewedAt,
    ),
    uniqueIndex("weigh_ins_one_per_bag")
      .on(t.bagId)
      .where(sql`${t.state} = 'posted'`),
    index("weigh_ins_recorded").on(t.recordedAt),
    index("weigh_ins_bag").on(t.bagId),
    index("weigh_ins_point").on(t.pointId, t.recordedAt),
    index("weigh_ins_review")
      .on(t.recordedAt)
      .where(sql`${t.state} = 'for-review'`),
  ],
);

export const weighInReadings = sqliteTable(
  "weigh_in_readings",
  {
    weighInId: idColumn<"weigh-in">("weigh_in_id")
      .notNull()
      .references(() => weighIns.id),
    seq: integer("seq").notNull(),
    grossMilligrams: milligramsColumn("gross_mg").notNull(),
    containerId: idColumn<"container">("container_id").references(() => containers.id),
    containerTareMilligrams: milligramsColumn("container_tare_mg").notNull(),
    sackId: idColumn<"container">("sack_id").references(() => containers.id),
    sackTareMilligrams: milligramsColumn("sack_tare_mg").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.weighInId, t.seq] }),
    wholeNumbers(
      "weigh_in_readings_whole_numbers",
      t.seq,
      t.grossMilligrams,
      t.containerTareMilligrams,
      t.sackTareMilligrams,
    ),
  ],
);
