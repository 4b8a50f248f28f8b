/** The palette and the lots. What a lot holds is in the ledger's balances. */
import { sql } from "drizzle-orm";
import { check, index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { BASES, LOSS_CAUSES } from "@/lib/ledger/terms";
import {
  COLOUR_LOOKS,
  COUNT_KINDS,
  IDENTIFY_METHODS,
  LOT_ENDS,
  MOVE_KINDS,
  RECORD_STATES,
  STEP_KINDS,
  TAKING,
} from "@/lib/stock/terms";
import {
  gramsColumn,
  idColumn,
  instantColumn,
  milligramsColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { people } from "./identity";
import { holders, materials } from "./ledger";
import { sites } from "./platform";
import { containers, scales } from "./scales";

export const colours = sqliteTable(
  "colours",
  {
    code: text("code").primaryKey(),
    name: text("name").notNull().unique(),
    /** "#1f46d6" */
    hex: text("hex").notNull(),
    look: text("look", { enum: COLOUR_LOOKS }).notNull(),
    position: integer("position").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("colours_look", t.look, COLOUR_LOOKS),
    wholeNumbers("colours_whole_numbers", t.position, t.retiredAt),
  ],
);

export const lots = sqliteTable(
  "lots",
  {
    id: idColumn<"lot">("id").primaryKey(),
    number: integer("number").notNull().unique(),
    holderId: integer("holder_id")
      .notNull()
      .unique()
      .references(() => holders.id),
    materialId: integer("material_id")
      .notNull()
      .references(() => materials.id),
    siteId: integer("site_id")
      .notNull()
      .references(() => sites.id),
    place: text("place").notNull().default(""),
    openedAt: instantColumn("opened_at").notNull(),
    closedAt: instantColumn("closed_at"),
    closedFor: text("closed_for", { enum: LOT_ENDS }),
    /** The listed container that it lies in. */
    containerId: idColumn<"container">("container_id").references(() => containers.id),
  },
  (t) => [
    wholeNumbers("lots_whole_numbers", t.number, t.openedAt, t.closedAt),
    check(
      "lots_closed_for",
      sql`${t.closedFor} is null or (${t.closedAt} is not null and ${t.closedFor} in (${sql.raw(LOT_ENDS.map((end) => `'${end}'`).join(", "))}))`,
    ),
    index("lots_material").on(t.materialId, t.closedAt),
    index("lots_open_since")
      .on(t.openedAt)
      .where(sql`${t.closedAt} is null`),
  ],
);

/** Whoever did it, when, and the acts that it made: the same for every record of the stock. */
const recordColumns = () => ({
  doneBy: idColumn<"person">("done_by")
    .notNull()
    .references(() => people.id),
  occurredAt: instantColumn("occurred_at").notNull(),
  recordedAt: instantColumn("recorded_at").notNull(),
  state: text("state", { enum: RECORD_STATES }).notNull(),
  undoneActId: integer("undone_act_id"),
});

/** Somebody weighed what is really in a container, or said that it is empty. */
export const counts = sqliteTable(
  "counts",
  {
    /** The request's id. */
    id: idColumn<"count">("id").primaryKey(),
    kind: text("kind", { enum: COUNT_KINDS }).notNull(),
    lotId: idColumn<"lot">("lot_id")
      .notNull()
      .references(() => lots.id),
    bookGrams: gramsColumn("book_grams").notNull(),
    countedGrams: gramsColumn("counted_grams").notNull(),
    basis: text("basis", { enum: BASES }).notNull(),
    scaleId: idColumn<"scale">("scale_id").references(() => scales.id),
    grossMilligrams: milligramsColumn("gross_mg"),
    tareMilligrams: milligramsColumn("tare_mg"),
    mpeMilligrams: milligramsColumn("mpe_mg").notNull(),
    /** Opening stock: number of the signed count sheet, and who signed. */
    sheet: text("sheet"),
    /** null: it agreed with the book to the gram, and nothing was posted. */
    actId: integer("act_id"),
    corrects: idColumn<"count">("corrects"),
    reviewedBy: idColumn<"person">("reviewed_by").references(() => people.id),
    reviewedAt: instantColumn("reviewed_at"),
    ...recordColumns(),
  },
  (t) => [
    oneOf("counts_kind", t.kind, COUNT_KINDS),
    oneOf("counts_state", t.state, RECORD_STATES),
    oneOf("counts_basis", t.basis, BASES),
    check("counts_grams", sql`${t.bookGrams} >= 0 and ${t.countedGrams} >= 0`),
    check("counts_opening", sql`(${t.kind} = 'opening') = (${t.sheet} is not null)`),
    wholeNumbers(
      "counts_whole_numbers",
      t.bookGrams,
      t.countedGrams,
      t.grossMilligrams,
      t.tareMilligrams,
      t.mpeMilligrams,
      t.actId,
      t.reviewedAt,
      t.occurredAt,
      t.recordedAt,
      t.undoneActId,
    ),
    index("counts_lot").on(t.lotId, t.recordedAt),
    index("counts_to_review")
      .on(t.recordedAt)
      .where(sql`${t.reviewedAt} is null and ${t.state} = 'posted'`),
  ],
);

/** From one lot into another: merged, split, or "Not sure" that was identified. */
export const lotMoves = sqliteTable(
  "lot_moves",
  {
    id: idColumn<"lot-move">("id").primaryKey(),
    kind: text("kind", { enum: MOVE_KINDS }).notNull(),
    fromLotId: idColumn<"lot">("from_lot_id")
      .notNull()
      .references(() => lots.id),
    toLotId: idColumn<"lot">("to_lot_id")
      .notNull()
      .references(() => lots.id),
    grams: gramsColumn("grams").notNull(),
    method: text("method", { enum: IDENTIFY_METHODS }),
    scaleId: idColumn<"scale">("scale_id").references(() => scales.id),
    actId: integer("act_id").notNull(),
    corrects: idColumn<"lot-move">("corrects"),
    ...recordColumns(),
  },
  (t) => [
    oneOf("lot_moves_kind", t.kind, MOVE_KINDS),
    oneOf("lot_moves_state", t.state, RECORD_STATES),
    check("lot_moves_grams", sql`${t.grams} > 0`),
    check("lot_moves_method", sql`(${t.kind} = 'identify') = (${t.method} is not null)`),
    check("lot_moves_two_lots", sql`${t.fromLotId} <> ${t.toLotId}`),
    wholeNumbers(
      "lot_moves_whole_numbers",
      t.grams,
      t.actId,
      t.occurredAt,
      t.recordedAt,
      t.undoneActId,
    ),
    index("lot_moves_from").on(t.fromLotId),
    index("lot_moves_to").on(t.toLotId),
  ],
);

/** Washing, drying, shredding: from lots of one polymer into another form or wash state. */
export const steps = sqliteTable(
  "steps",
  {
    id: idColumn<"step">("id").primaryKey(),
    kind: text("kind", { enum: STEP_KINDS }).notNull(),
    minutes: integer("minutes"),
    inputGrams: gramsColumn("input_grams").notNull(),
    outputGrams: gramsColumn("output_grams").notNull(),
    /** Named losses together; what is left is difference (below zero: a gain). */
    lossGrams: gramsColumn("loss_grams").notNull(),
    toleranceMilligrams: milligramsColumn("tolerance_mg").notNull(),
    actId: integer("act_id").notNull(),
    corrects: idColumn<"step">("corrects"),
    ...recordColumns(),
  },
  (t) => [
    oneOf("steps_kind", t.kind, STEP_KINDS),
    oneOf("steps_state", t.state, RECORD_STATES),
    check(
      "steps_grams",
      sql`${t.inputGrams} > 0 and ${t.outputGrams} >= 0 and ${t.lossGrams} >= 0`,
    ),
    wholeNumbers(
      "steps_whole_numbers",
      t.minutes,
      t.inputGrams,
      t.outputGrams,
      t.lossGrams,
      t.toleranceMilligrams,
      t.actId,
      t.occurredAt,
      t.recordedAt,
      t.undoneActId,
    ),
    /** The scheme's own loss of a step is read from its last ones. */
    index("steps_kind_recorded")
      .on(t.kind, t.recordedAt)
      .where(sql`${t.state} = 'posted'`),
  ],
);

export const stepInputs = sqliteTable(
  "step_inputs",
  {
    stepId: idColumn<"step">("step_id")
      .notNull()
      .references(() => steps.id),
    lotId: idColumn<"lot">("lot_id")
      .notNull()
      .references(() => lots.id),
    grams: gramsColumn("grams").notNull(),
    taking: text("taking", { enum: TAKING }).notNull(),
    scaleId: idColumn<"scale">("scale_id").references(() => scales.id),
    /** Reading as taken, or before; and what was taken off it: tare, or the reading after. */
    grossMilligrams: milligramsColumn("gross_mg"),
    lessMilligrams: milligramsColumn("less_mg"),
  },
  (t) => [
    primaryKey({ columns: [t.stepId, t.lotId] }),
    oneOf("step_inputs_taking", t.taking, TAKING),
    check("step_inputs_grams", sql`${t.grams} > 0`),
    wholeNumbers("step_inputs_whole_numbers", t.grams, t.grossMilligrams, t.lessMilligrams),
    index("step_inputs_lot").on(t.lotId),
  ],
);

export const stepOutputs = sqliteTable(
  "step_outputs",
  {
    stepId: idColumn<"step">("step_id")
      .notNull()
      .references(() => steps.id),
    seq: integer("seq").notNull(),
    lotId: idColumn<"lot">("lot_id")
      .notNull()
      .references(() => lots.id),
    grams: gramsColumn("grams").notNull(),
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    grossMilligrams: milligramsColumn("gross_mg").notNull(),
    tareMilligrams: milligramsColumn("tare_mg").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.stepId, t.seq] }),
    check("step_outputs_grams", sql`${t.grams} > 0`),
    wholeNumbers("step_outputs_whole_numbers", t.seq, t.grams, t.grossMilligrams, t.tareMilligrams),
    index("step_outputs_lot").on(t.lotId),
  ],
);

export const stepLosses = sqliteTable(
  "step_losses",
  {
    stepId: idColumn<"step">("step_id")
      .notNull()
      .references(() => steps.id),
    cause: text("cause", { enum: LOSS_CAUSES }).notNull(),
    grams: gramsColumn("grams").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.stepId, t.cause] }),
    oneOf("step_losses_cause", t.cause, LOSS_CAUSES),
    check("step_losses_grams", sql`${t.grams} > 0`),
    wholeNumbers("step_losses_whole_numbers", t.grams),
  ],
);
