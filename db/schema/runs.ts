/** Runs of the workshop, their blends, and what of the stock is promised to them. */
import { sql } from "drizzle-orm";
import { check, index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { POLYMERS } from "@/lib/core/plastics";
import { RESERVATION_STATES, RUN_STATES } from "@/lib/production/terms";
import { gramsColumn, idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";
import { people } from "./identity";
import { holders } from "./ledger";
import { sites } from "./platform";
import { machines, pieces, tools } from "./production";
import { colours, lots } from "./stock";

/** One production session: one kind of piece, by one method, of one polymer. */
export const runs = sqliteTable(
  "runs",
  {
    /** The request's id. */
    id: idColumn<"run">("id").primaryKey(),
    number: integer("number").notNull().unique(),
    /** null until it starts. */
    holderId: integer("holder_id")
      .unique()
      .references(() => holders.id),
    siteId: integer("site_id")
      .notNull()
      .references(() => sites.id),
    state: text("state", { enum: RUN_STATES }).notNull(),
    pieceId: idColumn<"piece">("piece_id")
      .notNull()
      .references(() => pieces.id),
    polymer: text("polymer", { enum: POLYMERS }).notNull(),
    toolId: idColumn<"tool">("tool_id").references(() => tools.id),
    machineId: idColumn<"machine">("machine_id").references(() => machines.id),
    /** Pieces, or sheets where it presses. */
    wantedPieces: integer("wanted_pieces").notNull(),
    /** What the plan came to when it was saved. */
    needGrams: gramsColumn("need_grams").notNull(),
    plannedShots: integer("planned_shots"),
    plannedSeconds: integer("planned_s").notNull(),
    /** How much the blend is folded, 0 to 100, and the seed of its picture. */
    folded: integer("folded").notNull(),
    seed: integer("seed").notNull(),
    plannedBy: idColumn<"person">("planned_by")
      .notNull()
      .references(() => people.id),
    plannedAt: instantColumn("planned_at").notNull(),
  },
  (t) => [
    oneOf("runs_state", t.state, RUN_STATES),
    oneOf("runs_polymer", t.polymer, POLYMERS),
    check("runs_wanted", sql`${t.wantedPieces} > 0 and ${t.needGrams} > 0`),
    wholeNumbers(
      "runs_whole_numbers",
      t.number,
      t.wantedPieces,
      t.needGrams,
      t.plannedShots,
      t.plannedSeconds,
      t.folded,
      t.seed,
      t.plannedAt,
    ),
    index("runs_state_number").on(t.state, t.number),
  ],
);

/** The blend: shares of colours in thousandths, and their grams of the need. */
export const runColours = sqliteTable(
  "run_colours",
  {
    runId: idColumn<"run">("run_id")
      .notNull()
      .references(() => runs.id),
    colourCode: text("colour_code")
      .notNull()
      .references(() => colours.code),
    thousandths: integer("thousandths").notNull(),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.runId, t.colourCode] }),
    check("run_colours_share", sql`${t.thousandths} between 1 and 1000 and ${t.grams} >= 0`),
    wholeNumbers("run_colours_whole_numbers", t.thousandths, t.grams),
  ],
);

/**
 * Grams of a lot that are promised to a run. Which of them the lot no longer covers is worked out from the balance:
 * the newest turns short first.
 */
export const reservations = sqliteTable(
  "reservations",
  {
    id: idColumn<"reservation">("id").primaryKey(),
    /** Order of promising. */
    seq: integer("seq").notNull().unique(),
    runId: idColumn<"run">("run_id")
      .notNull()
      .references(() => runs.id),
    lotId: idColumn<"lot">("lot_id")
      .notNull()
      .references(() => lots.id),
    promisedGrams: gramsColumn("promised_grams").notNull(),
    /** What of it was not drawn yet. */
    grams: gramsColumn("grams").notNull(),
    state: text("state", { enum: RESERVATION_STATES }).notNull(),
    reservedBy: idColumn<"person">("reserved_by")
      .notNull()
      .references(() => people.id),
    reservedAt: instantColumn("reserved_at").notNull(),
    lapsesAt: instantColumn("lapses_at").notNull(),
    /** When its lead was told that it lapses soon, and that it is short. */
    warnedAt: instantColumn("warned_at"),
    toldShortAt: instantColumn("told_short_at"),
    endedAt: instantColumn("ended_at"),
  },
  (t) => [
    oneOf("reservations_state", t.state, RESERVATION_STATES),
    check(
      "reservations_grams",
      sql`${t.promisedGrams} > 0 and ${t.grams} between 0 and ${t.promisedGrams}`,
    ),
    check("reservations_ended", sql`(${t.state} = 'held') = (${t.endedAt} is null)`),
    wholeNumbers(
      "reservations_whole_numbers",
      t.seq,
      t.promisedGrams,
      t.grams,
      t.reservedAt,
      t.lapsesAt,
      t.warnedAt,
      t.toldShortAt,
      t.endedAt,
    ),
    index("reservations_run").on(t.runId),
    index("reservations_held")
      .on(t.lotId, t.seq)
      .where(sql`${t.state} = 'held'`),
  ],
);
