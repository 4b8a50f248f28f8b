/** Photos. The bytes are in the storage service; a row says what they belong to and who may see them. */
import { sql } from "drizzle-orm";
import { check, index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { PHOTO_PURPOSES, PHOTO_SUBJECTS, PHOTO_VISIBILITIES } from "@/lib/uploads/terms";
import { idColumn, instantColumn, oneOf, wholeNumbers } from "../columns";
import { people } from "./identity";

export const photos = sqliteTable(
  "photos",
  {
    /** Made by the client before it sends, so that a second try is the same photo. */
    id: idColumn<"photo">("id").primaryKey(),
    subjectKind: text("subject_kind", { enum: PHOTO_SUBJECTS }).notNull(),
    /** Id of the weigh-in or lot. No foreign key: a photo may arrive before its weigh-in is saved. */
    subjectId: text("subject_id").notNull(),
    purpose: text("purpose", { enum: PHOTO_PURPOSES }).notNull(),
    visibility: text("visibility", { enum: PHOTO_VISIBILITIES }).notNull(),
    ownerId: idColumn<"person">("owner_id")
      .notNull()
      .references(() => people.id),
    addedAt: instantColumn("added_at").notNull(),
    /** Keys in the storage; the original's is kept to answer a completion that is called twice. */
    originalKey: text("original_key").notNull().unique(),
    largeKey: text("large_key").notNull().unique(),
    thumbKey: text("thumb_key").notNull().unique(),
    width: integer("width").notNull(),
    height: integer("height").notNull(),
    bytes: integer("bytes").notNull(),
    /** CIELAB (D65) of the middle in hundredths, for a chip photo. */
    labL: integer("lab_l"),
    labA: integer("lab_a"),
    labB: integer("lab_b"),
    removedAt: instantColumn("removed_at"),
    /** Null: the tidying, because nothing referred to it. */
    removedBy: idColumn<"person">("removed_by").references(() => people.id),
    /** When the storage had let go of its files. */
    filesDeletedAt: instantColumn("files_deleted_at"),
  },
  (t) => [
    oneOf("photos_subject_kind", t.subjectKind, PHOTO_SUBJECTS),
    oneOf("photos_purpose", t.purpose, PHOTO_PURPOSES),
    oneOf("photos_visibility", t.visibility, PHOTO_VISIBILITIES),
    check("photos_size", sql`${t.width} > 0 and ${t.height} > 0 and ${t.bytes} > 0`),
    check(
      "photos_colour",
      sql`(${t.labL} is null) = (${t.labA} is null) and (${t.labL} is null) = (${t.labB} is null)`,
    ),
    check("photos_removed", sql`${t.filesDeletedAt} is null or ${t.removedAt} is not null`),
    wholeNumbers(
      "photos_whole_numbers",
      t.width,
      t.height,
      t.bytes,
      t.labL,
      t.labA,
      t.labB,
      t.addedAt,
      t.removedAt,
      t.filesDeletedAt,
    ),
    index("photos_subject").on(t.subjectKind, t.subjectId, t.addedAt),
    index("photos_files_to_delete")
      .on(t.removedAt)
      .where(sql`${t.removedAt} is not null and ${t.filesDeletedAt} is null`),
    uniqueIndex("photos_one_chip")
      .on(t.subjectKind, t.subjectId)
      .where(sql`${t.purpose} = 'chip' and ${t.removedAt} is null`),
  ],
);
