/** Drop-off points. */
import { sqliteTable, text } from "drizzle-orm/sqlite-core";
import { POINT_KINDS } from "@/lib/points/terms";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";

export const points = sqliteTable(
  "points",
  {
    id: idColumn<"point">("id").primaryKey(),
    name: text("name").notNull().unique(),
    kind: text("kind", { enum: POINT_KINDS }).notNull(),
    createdAt: instantColumn("created_at").notNull(),
    closedAt: instantColumn("closed_at"),
  },
  (t) => [
    oneOf("points_kind", t.kind, POINT_KINDS),
    wholeNumbers("points_whole_numbers", t.createdAt, t.closedAt),
  ],
);
