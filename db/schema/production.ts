/** The workshop's catalogue: what it makes, with what. */
import { sql } from "drizzle-orm";
import { check, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { KINDS, POLYMERS } from "@/lib/core/plastics";
import { METHODS } from "@/lib/production/terms";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";

/**
 * What the workshop makes. Lengths are whole micrometres, masses whole milligrams, volumes whole cubic
 * millimetres, money whole hundredths, shares whole thousandths.
 */
export const pieces = sqliteTable(
  "pieces",
  {
    id: idColumn<"piece">("id").primaryKey(),
    name: text("name").notNull().unique(),
    method: text("method", { enum: METHODS }).notNull(),
    /** The sheet: what pressing makes, and what cutting takes. */
    lengthUm: integer("length_um"),
    widthUm: integer("width_um"),
    thicknessUm: integer("thickness_um"),
    /** Pressing: flash and trimmings above the sheet's own mass. */
    trimThousandths: integer("trim_thousandths"),
    /** Cutting: pieces out of one sheet. */
    piecesPerSheet: integer("pieces_per_sheet"),
    /** One of the two, for moulded and cut pieces. */
    volumeMm3: integer("volume_mm3"),
    massMilligrams: integer("mass_mg"),
    /** Good pieces weighed together replace the computed mass. */
    weighedMilligrams: integer("weighed_mg"),
    weighedPieces: integer("weighed_pieces"),
    weighedAt: instantColumn("weighed_at"),
    priceCents: integer("price_cents"),
    otherCostCents: integer("other_cost_cents").notNull(),
    /** Largest share of material that was heated before; null: no limit. */
    mostHeatedThousandths: integer("most_heated_thousandths"),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("pieces_method", t.method, METHODS),
    wholeNumbers(
      "pieces_whole_numbers",
      t.lengthUm,
      t.widthUm,
      t.thicknessUm,
      t.trimThousandths,
      t.piecesPerSheet,
      t.volumeMm3,
      t.massMilligrams,
      t.weighedMilligrams,
      t.weighedPieces,
      t.weighedAt,
      t.priceCents,
      t.otherCostCents,
      t.mostHeatedThousandths,
      t.createdAt,
      t.retiredAt,
    ),
    check(
      "pieces_sheet",
      sql`(${t.method} = 'moulding') = (${t.lengthUm} is null) and (${t.lengthUm} is null) = (${t.thicknessUm} is null) and (${t.lengthUm} is null) = (${t.widthUm} is null)`,
    ),
    check(
      "pieces_cutting",
      sql`(${t.method} = 'cutting') = (${t.piecesPerSheet} is not null) and (${t.method} = 'pressing') = (${t.trimThousandths} is not null)`,
    ),
  ],
);

/** Polymers that a piece may be made of. */
export const piecePolymers = sqliteTable(
  "piece_polymers",
  {
    pieceId: idColumn<"piece">("piece_id")
      .notNull()
      .references(() => pieces.id),
    polymer: text("polymer", { enum: POLYMERS }).notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.pieceId, t.polymer] }),
    oneOf("piece_polymers_polymer", t.polymer, POLYMERS),
  ],
);

/** Kinds that it may be made of. */
export const pieceKinds = sqliteTable(
  "piece_kinds",
  {
    pieceId: idColumn<"piece">("piece_id")
      .notNull()
      .references(() => pieces.id),
    kind: text("kind", { enum: KINDS }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.pieceId, t.kind] }), oneOf("piece_kinds_kind", t.kind, KINDS)],
);

export const tools = sqliteTable(
  "tools",
  {
    id: idColumn<"tool">("id").primaryKey(),
    name: text("name").notNull().unique(),
    pieceId: idColumn<"piece">("piece_id")
      .notNull()
      .references(() => pieces.id),
    cavities: integer("cavities").notNull(),
    gates: integer("gates").notNull(),
    /** Sprue and runners of one shot. */
    runnerMilligrams: integer("runner_mg").notNull(),
    costCents: integer("cost_cents").notNull(),
    preheatSeconds: integer("preheat_s").notNull(),
    /** Shots made before the first run that is recorded here. */
    shotsBefore: integer("shots_before").notNull(),
    /** Service is due when so many shots were made; null: not counted. */
    serviceAtShots: integer("service_at_shots"),
    /** Until its own history tells: shots to begin with that give no piece, and the share of pieces that are good. */
    startUpShots: integer("start_up_shots").notNull(),
    goodThousandths: integer("good_thousandths").notNull(),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    check("tools_cavities", sql`${t.cavities} > 0 and ${t.gates} > 0`),
    check("tools_good", sql`${t.goodThousandths} between 1 and 1000`),
    wholeNumbers(
      "tools_whole_numbers",
      t.cavities,
      t.gates,
      t.runnerMilligrams,
      t.costCents,
      t.preheatSeconds,
      t.shotsBefore,
      t.serviceAtShots,
      t.startUpShots,
      t.goodThousandths,
      t.createdAt,
      t.retiredAt,
    ),
  ],
);

export const machines = sqliteTable(
  "machines",
  {
    id: idColumn<"machine">("id").primaryKey(),
    name: text("name").notNull().unique(),
    method: text("method", { enum: METHODS }).notNull(),
    /** A press: its plate. */
    plateLengthUm: integer("plate_length_um"),
    plateWidthUm: integer("plate_width_um"),
    /** A moulding machine: its barrel, how much of it can be used, what a shot needs at least, what a change purges. */
    barrelMm3: integer("barrel_mm3"),
    usableThousandths: integer("usable_thousandths"),
    leastShotMilligrams: integer("least_shot_mg"),
    purgeMilligrams: integer("purge_mg"),
    /** Melting one fill or one pressing; one shot, sheet or cut after that. */
    meltSeconds: integer("melt_s").notNull(),
    cycleSeconds: integer("cycle_s").notNull(),
    ratedWatts: integer("rated_watts"),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("machines_method", t.method, METHODS),
    check("machines_press", sql`(${t.method} = 'pressing') = (${t.plateLengthUm} is not null)`),
    check("machines_moulding", sql`(${t.method} = 'moulding') = (${t.barrelMm3} is not null)`),
    wholeNumbers(
      "machines_whole_numbers",
      t.plateLengthUm,
      t.plateWidthUm,
      t.barrelMm3,
      t.usableThousandths,
      t.leastShotMilligrams,
      t.purgeMilligrams,
      t.meltSeconds,
      t.cycleSeconds,
      t.ratedWatts,
      t.createdAt,
      t.retiredAt,
    ),
  ],
);

/** The lead's own temperature for a machine and a polymer. */
export const setPoints = sqliteTable(
  "set_points",
  {
    machineId: idColumn<"machine">("machine_id")
      .notNull()
      .references(() => machines.id),
    polymer: text("polymer", { enum: POLYMERS }).notNull(),
    celsius: integer("celsius").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.machineId, t.polymer] }),
    oneOf("set_points_polymer", t.polymer, POLYMERS),
    wholeNumbers("set_points_whole_numbers", t.celsius),
  ],
);

/** A scheme's own density of a polymer, in milligrams a cubic centimetre, with where it comes from. */
export const densities = sqliteTable(
  "densities",
  {
    polymer: text("polymer", { enum: POLYMERS }).primaryKey(),
    mgPerCm3: integer("mg_per_cm3").notNull(),
    source: text("source").notNull(),
    changedAt: instantColumn("changed_at").notNull(),
  },
  (t) => [
    oneOf("densities_polymer", t.polymer, POLYMERS),
    wholeNumbers("densities_whole_numbers", t.mgPerCm3, t.changedAt),
  ],
);
