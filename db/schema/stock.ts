/** The palette and the lots. What a lot holds is in the ledger's balances. */
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { COLOUR_LOOKS } from "@/lib/stock/terms";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";
import { holders, materials } from "./ledger";
import { sites } from "./platform";

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
  },
  (t) => [
    wholeNumbers("lots_whole_numbers", t.number, t.openedAt, t.closedAt),
    index("lots_material").on(t.materialId, t.closedAt),
  ],
);
