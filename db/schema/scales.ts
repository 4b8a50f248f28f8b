/** Scales, containers and sacks. Loads are whole milligrams. */
import { sql } from "drizzle-orm";
import { check, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { SCALE_CLASSES, TARE_KINDS } from "@/lib/scales/terms";
import { idColumn, instantColumn, milligramsColumn, oneOf, wholeNumbers } from "../columns";
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
