/**
 * A file arrived at the storage: it becomes a photo, or nothing. Called by the completion of an upload, perhaps
 * twice for one file, perhaps for a second file of one photo when an answer was lost on the way.
 */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Id } from "@/lib/core/ids";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Readable, type Tx } from "@/lib/platform/database";
import { log } from "@/lib/platform/logger";
import { OWN_NAME, type Storage } from "@/lib/platform/storage";
import type { Photo, PhotoInput } from "../contract";
import { countOthers, findChip, findKnownPhoto, isServedKey } from "../queries/photos";
import { subjectExists } from "../queries/subjects";
import { refuseSubject } from "../rules/admission";
import { MOST_PHOTO_BYTES, MOST_PHOTOS } from "../terms";
import { makePicture, type Picture } from "./picture";

/** How a file is called in the storage while it is what was sent. */
export const ORIGINAL_NAME = `${OWN_NAME}original`;

export type ArrivedFile = PhotoInput & { fileKey: string };

/**
 * May this photo be added? Asked before anything is sent, and again when it arrived.
 *
 * @throws AppError `photo-subject-unknown`, `photos-too-many`, or `request-id-reused` when the id is that of
 *   another person's photo or of another subject's
 */
export function checkAdmission(db: Readable, ctx: Context, input: PhotoInput): void {
  allow(ctx, "photos.add");
  const known = findKnownPhoto(db, input.photoId, null);
  if (known) {
    requireSame(known, ctx, input);
    return;
  }
  const refused = refuseSubject({
    kind: input.subjectKind,
    id: input.subjectId,
    exists: subjectExists(db, input.subjectKind, input.subjectId),
    purpose: input.purpose,
    others: countOthers(db, input.subjectKind, input.subjectId, input.photoId),
  });
  if (refused) throw new AppError(refused, { most: MOST_PHOTOS });
}

function requireSame(
  known: NonNullable<ReturnType<typeof findKnownPhoto>>,
  ctx: Context,
  input: PhotoInput,
): Photo {
  const same =
    known.photo.id === input.photoId &&
    known.ownerId === requirePerson(ctx) &&
    known.subjectKind === input.subjectKind &&
    known.subjectId === input.subjectId;
  if (!same) throw new AppError("request-id-reused");
  if (known.removed) throw new AppError("not-found");
  return known.photo;
}

/** The file as it was sent; no more than was allowed, whatever the storage says of it. */
async function readOriginal(storage: Storage, key: string): Promise<Buffer> {
  const answer = await storage.open(key);
  if (!answer?.body) throw new AppError("photo-unfinished");
  const chunks: Uint8Array[] = [];
  let length = 0;
  try {
    for await (const chunk of answer.body as unknown as AsyncIterable<Uint8Array>) {
      length += chunk.byteLength;
      if (length > MOST_PHOTO_BYTES) throw new AppError("photo-too-large");
      chunks.push(chunk);
    }
  } catch (error) {
    throw error instanceof AppError ? error : new AppError("photo-storage-down");
  }
  if (length === 0) throw new AppError("photo-empty");
  return Buffer.concat(chunks, length);
}

type Keys = { large: string; thumb: string };

/** In hundredths, as the columns hold it. */
const hundredths = (value: number | undefined): number | null =>
  value === undefined ? null : Math.round(value * 100);

function insertIn(tx: Tx, ctx: Context, file: ArrivedFile, picture: Picture, keys: Keys): Photo {
  // Since the first look somebody else may have filled the place, or the subject may have gone.
  checkAdmission(tx, ctx, file);
  const replaced = file.purpose === "chip" ? findChip(tx, file.subjectKind, file.subjectId) : null;
  if (replaced) {
    prepared(tx.client, "update photos set purpose = 'view' where id = ?").run(replaced);
  }
  prepared(
    tx.client,
    `insert into photos (id, subject_kind, subject_id, purpose, visibility, owner_id, added_at,
       original_key, large_key, thumb_key, width, height, bytes, lab_l, lab_a, lab_b)
     values (?, ?, ?, ?, 'shed', ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    file.photoId,
    file.subjectKind,
    file.subjectId,
    file.purpose,
    requirePerson(ctx),
    ctx.now,
    file.fileKey,
    keys.large,
    keys.thumb,
    picture.width,
    picture.height,
    picture.large.byteLength,
    hundredths(picture.lab?.l),
    hundredths(picture.lab?.a),
    hundredths(picture.lab?.b),
  );
  recordAudit(tx, ctx, {
    action: "photos.add",
    subjectKind: file.subjectKind,
    subjectId: file.subjectId,
    fields: { photoId: file.photoId, purpose: file.purpose, replacedChip: replaced },
  });
  const added = findKnownPhoto(tx, file.photoId, null);
  if (!added) throw new Error("the photo was inserted and is not there");
  return added.photo;
}

/** Best effort: what stays behind has no row, and the tidying finds it. */
async function letGo(storage: Storage, keys: readonly string[]): Promise<void> {
  try {
    await storage.remove(keys);
  } catch (error) {
    log.warn("photo-left-behind", { files: keys.length, cause: String(error) });
  }
}

async function addOnce(ctx: Context, storage: Storage, file: ArrivedFile): Promise<Photo> {
  const known = findKnownPhoto(ctx.db.reader, file.photoId, file.fileKey);
  if (known) return requireSame(known, ctx, file);
  checkAdmission(ctx.db.reader, ctx, file);
  const original = await readOriginal(storage, file.fileKey);
  const picture = await makePicture(original, file.purpose === "chip");
  const kept: string[] = [];
  try {
    const large = await storage.put(picture.large, `${OWN_NAME}large`);
    kept.push(large);
    const thumb = await storage.put(picture.thumb, `${OWN_NAME}thumb`);
    kept.push(thumb);
    return inTransaction<Photo>(ctx, (tx) => insertIn(tx, ctx, file, picture, { large, thumb }));
  } catch (error) {
    await letGo(storage, kept);
    throw error;
  }
}

/** One after the other for each photo: a completion that is called twice at once does its work once. */
const underWay = new Map<string, Promise<unknown>>();

/**
 * Makes a photo of a file that arrived, and lets go of the file itself in any case.
 *
 * @throws AppError with the reason why nothing was kept
 */
export async function addPhoto(ctx: Context, storage: Storage, file: ArrivedFile): Promise<Photo> {
  allow(ctx, "photos.add");
  const id: Id<"photo"> = file.photoId;
  const before = underWay.get(id);
  const work = (async () => {
    await before?.catch(() => undefined);
    try {
      return await addOnce(ctx, storage, file);
    } finally {
      // Keys are short hashes: should one ever be given twice, it is not a served picture that goes.
      if (!isServedKey(ctx.db.reader, file.fileKey)) await letGo(storage, [file.fileKey]);
    }
  })();
  underWay.set(id, work);
  try {
    return await work;
  } finally {
    if (underWay.get(id) === work) underWay.delete(id);
  }
}
