/** Photos of a subject, and where the bytes of one are. */
import "server-only";
import type * as z from "zod";
import type { Id, PersonId } from "@/lib/core/ids";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { listPhotosEndpoint, Photo, photoFileEndpoint } from "../contract";
import type { PhotoPurpose, PhotoSubject } from "../terms";
import { subjectExists, subjectExistsSql } from "./subjects";

type PhotoRow = Omit<Photo, "lab"> & {
  labL: number | null;
  labA: number | null;
  labB: number | null;
};

const SELECT = `
  select p.id, p.purpose, p.width, p.height, p.added_at as addedAt, o.name as addedBy,
         p.lab_l as labL, p.lab_a as labA, p.lab_b as labB
  from photos p left join people o on o.id = p.owner_id`;

const HUNDREDTHS = 100;

function toPhoto({ labL, labA, labB, ...row }: PhotoRow): Photo {
  const lab =
    labL === null || labA === null || labB === null
      ? null
      : { l: labL / HUNDREDTHS, a: labA / HUNDREDTHS, b: labB / HUNDREDTHS };
  return { ...row, lab };
}

/**
 * Live photos of one record, oldest first: for the page of a record that exists, whose query has asked for
 * its own permission.
 */
export function photosOf(db: Readable, kind: PhotoSubject, id: string): Photo[] {
  const rows = prepared(
    db.client,
    `${SELECT} where p.subject_kind = ? and p.subject_id = ? and p.removed_at is null
     order by p.added_at, p.id`,
  ).all(kind, id) as PhotoRow[];
  return rows.map(toPhoto);
}

/** Those of a record that is not there (yet) are seen by who took them, and by nobody else. */
export function listPhotos(
  ctx: Context,
  input: z.output<typeof listPhotosEndpoint.input>,
): z.output<typeof listPhotosEndpoint.output> {
  allow(ctx, "photos.read");
  return inSnapshot(ctx, (db) => {
    const { subjectKind, subjectId } = input;
    if (subjectExists(db, subjectKind, subjectId)) {
      return { photos: photosOf(db, subjectKind, subjectId) };
    }
    if (ctx.actor.kind !== "person") return { photos: [] };
    const rows = prepared(
      db.client,
      `${SELECT} where p.subject_kind = ? and p.subject_id = ? and p.removed_at is null
         and p.owner_id = ?
       order by p.added_at, p.id`,
    ).all(subjectKind, subjectId, ctx.actor.id) as PhotoRow[];
    return { photos: rows.map(toPhoto) };
  });
}

/** Where one picture's bytes are. */
export type PhotoFile = { key: string; etag: string };

/**
 * A picture that the caller may see, in one of its sizes.
 *
 * @throws AppError `not-found` for one that is not there, was removed, or is another person's business
 */
export function getPhotoFile(
  ctx: Context,
  input: z.output<typeof photoFileEndpoint.input>,
): PhotoFile {
  allow(ctx, "photos.read");
  const row = prepared(
    ctx.db.reader.client,
    `select p.large_key as large, p.thumb_key as thumb from photos p
     where p.id = ? and p.removed_at is null and (p.owner_id = ? or ${subjectExistsSql("p")})`,
  ).get(input.id, ctx.actor.kind === "person" ? ctx.actor.id : null) as
    { large: string; thumb: string } | undefined;
  if (!row) throw new AppError("not-found");
  return { key: row[input.size], etag: `"${input.id}-${input.size}"` };
}

/** What tells one upload from another: whose it is, of what, and as which file it came. */
export type KnownPhoto = {
  photo: Photo;
  ownerId: PersonId;
  subjectKind: PhotoSubject;
  subjectId: string;
  removed: boolean;
};

type KnownRow = PhotoRow & Omit<KnownPhoto, "photo" | "removed"> & { removed: 0 | 1 };

/** A photo that is stored already, by its id or by the key of the file as it was sent. */
export function findKnownPhoto(
  db: Readable,
  id: Id<"photo">,
  originalKey: string | null,
): KnownPhoto | null {
  const row = prepared(
    db.client,
    `select x.*, q.owner_id as ownerId, q.subject_kind as subjectKind, q.subject_id as subjectId,
            q.removed_at is not null as removed
     from (${SELECT} where p.id = ? or p.original_key = ?) x join photos q on q.id = x.id
     order by x.id = ? desc limit 1`,
  ).get(id, originalKey, id) as KnownRow | undefined;
  if (!row) return null;
  const { ownerId, subjectKind, subjectId, removed, ...photo } = row;
  return { photo: toPhoto(photo), ownerId, subjectKind, subjectId, removed: Boolean(removed) };
}

/** Live photos of a subject besides one. */
export function countOthers(
  db: Readable,
  kind: PhotoSubject,
  subjectId: string,
  id: Id<"photo">,
): number {
  return prepared(
    db.client,
    `select count(*) from photos
     where subject_kind = ? and subject_id = ? and removed_at is null and id <> ?`,
  )
    .pluck()
    .get(kind, subjectId, id) as number;
}

/** The live chip photo of a subject, or null. */
export function findChip(db: Readable, kind: PhotoSubject, subjectId: string): Id<"photo"> | null {
  const purpose: PhotoPurpose = "chip";
  return (prepared(
    db.client,
    `select id from photos
     where subject_kind = ? and subject_id = ? and purpose = ? and removed_at is null`,
  )
    .pluck()
    .get(kind, subjectId, purpose) ?? null) as Id<"photo"> | null;
}

/** Is this the key of a file that a live photo is served from? */
export function isServedKey(db: Readable, key: string): boolean {
  return (
    prepared(
      db.client,
      "select 1 from photos where (large_key = ? or thumb_key = ?) and files_deleted_at is null",
    ).get(key, key) !== undefined
  );
}
