/** Tags and bags. Codes of everything that can be scanned live in one table, several per bag. */
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { BAG_STATES, LABEL_KINDS } from "@/lib/bags/terms";
import type { LabelCode } from "@/lib/core/bag-code";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";
import { points } from "./points";

export const labels = sqliteTable(
  "labels",
  {
    code: text("code").$type<LabelCode>().primaryKey(),
    kind: text("kind", { enum: LABEL_KINDS }).notNull(),
    /** Id of the bag, lot, container, run or batch. */
    subject: text("subject").notNull(),
    madeAt: instantColumn("made_at").notNull(),
  },
  (t) => [
    oneOf("labels_kind", t.kind, LABEL_KINDS),
    wholeNumbers("labels_whole_numbers", t.madeAt),
    index("labels_subject").on(t.subject),
  ],
);

export const tagOrders = sqliteTable(
  "tag_orders",
  {
    id: idColumn<"tag-order">("id").primaryKey(),
    /** null: for no point yet. */
    pointId: idColumn<"point">("point_id").references(() => points.id),
    count: integer("count").notNull(),
    orderedBy: idColumn<"person">("ordered_by"),
    orderedAt: instantColumn("ordered_at").notNull(),
  },
  (t) => [
    wholeNumbers("tag_orders_whole_numbers", t.count, t.orderedAt),
    index("tag_orders_ordered_at").on(t.orderedAt),
  ],
);

export const bags = sqliteTable(
  "bags",
  {
    id: idColumn<"bag">("id").primaryKey(),
    /** The first code; a replaced tag adds a row to labels and leaves this one. */
    code: text("code").$type<LabelCode>().notNull().unique(),
    pointId: idColumn<"point">("point_id").references(() => points.id),
    orderId: idColumn<"tag-order">("order_id").references(() => tagOrders.id),
    state: text("state", { enum: BAG_STATES }).notNull(),
    /** When it came into its state. */
    stateSince: instantColumn("state_since").notNull(),
    printedAt: instantColumn("printed_at").notNull(),
  },
  (t) => [
    oneOf("bags_state", t.state, BAG_STATES),
    wholeNumbers("bags_whole_numbers", t.stateSince, t.printedAt),
    index("bags_state_since").on(t.state, t.stateSince),
    index("bags_order").on(t.orderId),
    index("bags_point").on(t.pointId),
  ],
);
