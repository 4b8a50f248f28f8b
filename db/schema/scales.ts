/** Scales, containers and sacks. Loads are whole milligrams. */
import { sql } from "drizzle-orm";
import { check, index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { SCALE_CLASSES, TARE_KINDS } from "@/lib/scales/terms";
import {
  dayColumn,
  idColumn,
  instantColumn,
  milligramsColumn,
  oneOf,
  wholeNumbers,
} from "../columns";
import { people } from "./identity";
import { sites } from "./platform";

export const scales = sqliteTable(
  "scales",
  {
    id: idColumn<"scale">("id").primaryKey(),
    /** The number under which the ledger knows it. */
    number: integer("number").notNull().unique(),
    name: text("name").notNull().unique(),
    siteId: integer("site_id")
      .notNull()
      .references(() => sites.id),
    class: text("class", { enum: SCALE_CLASSES }).notNull(),
    maxMilligrams: milligramsColumn("max_mg").notNull(),
    /** Verification scale interval e; null for a scale that is not verified. */
    eMilligrams: milligramsColumn("e_mg"),
    /** Display step d. */
    dMilligrams: milligramsColumn("d_mg").notNull(),
    /** Accuracy stated by the maker, ± milligrams, for a scale that is not verified. */
    statedAccuracyMilligrams: milligramsColumn("stated_accuracy_mg"),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("scales_class", t.class, SCALE_CLASSES),
    check(
      "scales_accuracy",
      sql`(${t.class} = 'none') = (${t.statedAccuracyMilligrams} is not null) and (${t.class} = 'none') = (${t.eMilligrams} is null)`,
    ),
    wholeNumbers(
      "scales_whole_numbers",
      t.number,
      t.maxMilligrams,
      t.eMilligrams,
      t.dMilligrams,
      t.statedAccuracyMilligrams,
      t.createdAt,
      t.retiredAt,
    ),
  ],
);

/** Things whose empty weight is known: crates, tubs, sacks. */
export const containers = sqliteTable(
  "containers",
  {
    id: idColumn<"container">("id").primaryKey(),
    kind: text("kind", { enum: TARE_KINDS }).notNull(),
    name: text("name").notNull().unique(),
    tareMilligrams: milligramsColumn("tare_mg").notNull(),
    /** Scanning this label sets the tare; null for a sack. */
    labelCode: text("label_code").unique(),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    oneOf("containers_kind", t.kind, TARE_KINDS),
    check("containers_tare", sql`${t.tareMilligrams} >= 0`),
    wholeNumbers("containers_whole_numbers", t.tareMilligrams, t.createdAt, t.retiredAt),
  ],
);

/** What a container weighed, and from when on: a ticket that waited is read with the tare of its own time. */
export const containerTares = sqliteTable(
  "container_tares",
  {
    containerId: idColumn<"container">("container_id")
      .notNull()
      .references(() => containers.id),
    validFrom: instantColumn("valid_from").notNull(),
    tareMilligrams: milligramsColumn("tare_mg").notNull(),
    setBy: idColumn<"person">("set_by").references(() => people.id),
  },
  (t) => [
    primaryKey({ columns: [t.containerId, t.validFrom] }),
    check("container_tares_tare", sql`${t.tareMilligrams} >= 0`),
    wholeNumbers("container_tares_whole_numbers", t.validFrom, t.tareMilligrams),
  ],
);

/** Objects of a mass that is known: weighed on a verified scale, or certified. */
export const checkWeights = sqliteTable(
  "check_weights",
  {
    id: idColumn<"check-weight">("id").primaryKey(),
    name: text("name").notNull().unique(),
    massMilligrams: milligramsColumn("mass_mg").notNull(),
    /** Number of its certificate, or where and when it was weighed. */
    evidence: text("evidence").notNull(),
    createdAt: instantColumn("created_at").notNull(),
    retiredAt: instantColumn("retired_at"),
  },
  (t) => [
    check("check_weights_mass", sql`${t.massMilligrams} > 0`),
    wholeNumbers("check_weights_whole_numbers", t.massMilligrams, t.createdAt, t.retiredAt),
  ],
);

/** A check weight on a scale, judged by the limits of its class at that load. */
export const scaleChecks = sqliteTable(
  "scale_checks",
  {
    /** The request's id. */
    id: idColumn<"scale-check">("id").primaryKey(),
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    checkWeightId: idColumn<"check-weight">("check_weight_id")
      .notNull()
      .references(() => checkWeights.id),
    /** Day in the scheme's zone. */
    day: dayColumn("day").notNull(),
    /** First of the day, or repeated. */
    attempt: integer("attempt").notNull(),
    /** As it was then. */
    massMilligrams: milligramsColumn("mass_mg").notNull(),
    readingMilligrams: milligramsColumn("reading_mg").notNull(),
    limitMilligrams: milligramsColumn("limit_mg").notNull(),
    passed: integer("passed", { mode: "boolean" }).notNull(),
    doneBy: idColumn<"person">("done_by")
      .notNull()
      .references(() => people.id),
    occurredAt: instantColumn("occurred_at").notNull(),
    recordedAt: instantColumn("recorded_at").notNull(),
  },
  (t) => [
    check("scale_checks_attempt", sql`${t.attempt} > 0`),
    wholeNumbers(
      "scale_checks_whole_numbers",
      t.attempt,
      t.massMilligrams,
      t.readingMilligrams,
      t.limitMilligrams,
      t.occurredAt,
      t.recordedAt,
    ),
    index("scale_checks_scale_day").on(t.scaleId, t.day, t.recordedAt),
  ],
);

/** A lead's word on a scale whose check failed or was left out that day. */
export const scaleClearances = sqliteTable(
  "scale_clearances",
  {
    scaleId: idColumn<"scale">("scale_id")
      .notNull()
      .references(() => scales.id),
    day: dayColumn("day").notNull(),
    note: text("note").notNull(),
    clearedBy: idColumn<"person">("cleared_by")
      .notNull()
      .references(() => people.id),
    clearedAt: instantColumn("cleared_at").notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.scaleId, t.day] }),
    wholeNumbers("scale_clearances_whole_numbers", t.clearedAt),
  ],
);
