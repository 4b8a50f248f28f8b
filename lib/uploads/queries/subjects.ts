/**
 * What photos belong to, found by table name in one map: uploads is an early area and imports none of the
 * areas whose records its photos show.
 */
import "server-only";
import { prepared, type Readable } from "@/lib/platform/database";
import { PHOTO_SUBJECTS, type PhotoSubject } from "../terms";

/** A session that was put aside is there: its photos wait with it. */
const SORTINGS =
  "(select id from sorting_sessions union all select id from sorting_drafts where state <> 'given-up')";

const TABLES: Readonly<Record<PhotoSubject, string>> = {
  "weigh-in": "weigh_ins",
  lot: "lots",
  sorting: SORTINGS,
  step: "steps",
  count: "counts",
  removal: "removals",
};

/** Is there such a record? */
export function subjectExists(db: Readable, kind: PhotoSubject, id: string): boolean {
  return prepared(db.client, `select 1 from ${TABLES[kind]} where id = ?`).get(id) !== undefined;
}

/**
 * "Its subject exists" as SQL about a photo.
 *
 * @param photo the name of the table or its alias in the statement
 */
export function subjectExistsSql(photo: string): string {
  const cases = PHOTO_SUBJECTS.map(
    (kind) =>
      `(${photo}.subject_kind = '${kind}' and exists (select 1 from ${TABLES[kind]} s where s.id = ${photo}.subject_id))`,
  );
  return `(${cases.join(" or ")})`;
}
