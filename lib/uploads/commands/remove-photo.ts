/** Removing a photo: from then on nobody sees it; its files go at once, or with the next tidying. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { inTransaction, prepared } from "@/lib/platform/database";
import { log } from "@/lib/platform/logger";
import { once } from "@/lib/platform/receipts";
import { storage, type Storage } from "@/lib/platform/storage";
import type { removePhotoEndpoint } from "../contract";
import { subjectExistsSql } from "../queries/subjects";

type Found = {
  subjectKind: string;
  subjectId: string;
  purpose: string;
  ownerId: string;
  /** Its record is saved. */
  saved: 0 | 1;
};

/** The keys of a photo's files. */
export type PhotoKeys = { id: string; large: string; thumb: string };

/**
 * Deletes the files of photos that were removed, and notes that they are gone.
 *
 * @throws AppError `photo-storage-down`; the rows stay marked, and the next tidying goes on
 */
export async function deleteFiles(
  ctx: Pick<Context, "db" | "now">,
  from: Storage,
  photos: readonly PhotoKeys[],
): Promise<void> {
  if (photos.length === 0) return;
  await from.remove(photos.flatMap(({ large, thumb }) => [large, thumb]));
  inTransaction(ctx, (tx) => {
    const note = prepared(
      tx.client,
      "update photos set files_deleted_at = ? where id = ? and files_deleted_at is null",
    );
    for (const { id } of photos) note.run(ctx.now, id);
  });
}

/**
 * One's own photo of a record that is not saved yet goes as it came; that of a saved one is part of the record.
 *
 * @throws AppError `not-found` for a photo that is not there or was removed before, and for that of a record
 *   which is not saved yet, unless it is one's own; `forbidden` for that of a saved record without "photos.remove"
 */
export async function removePhoto(
  ctx: Context,
  input: z.output<typeof removePhotoEndpoint.input>,
  from: Storage = storage(),
): Promise<z.output<typeof removePhotoEndpoint.output>> {
  allow(ctx, "photos.add");
  const receipt = once<{ id: string }>(ctx, "DELETE /api/photos/{id}", input.requestId, (tx) => {
    const found = prepared(
      tx.client,
      `select * from (
         select p.subject_kind as subjectKind, p.subject_id as subjectId, p.purpose, p.owner_id as ownerId,
                ${subjectExistsSql("p")} as saved
         from photos p where p.id = ? and p.removed_at is null)
       where saved or ownerId = ?`,
    ).get(input.id, ctx.actor.kind === "person" ? ctx.actor.id : null) as Found | undefined;
    if (!found) throw new AppError("not-found");
    if (found.saved) allow(ctx, "photos.remove");
    const { subjectKind, subjectId, purpose, ownerId } = found;
    prepared(tx.client, "update photos set removed_at = ?, removed_by = ? where id = ?").run(
      ctx.now,
      ctx.actor.kind === "person" ? ctx.actor.id : null,
      input.id,
    );
    recordAudit(tx, ctx, {
      action: "photos.remove",
      subjectKind,
      subjectId,
      fields: { photoId: input.id, purpose, ownerId },
    });
    return { id: input.id };
  });
  const left = prepared(
    ctx.db.reader.client,
    `select id, large_key as large, thumb_key as thumb from photos
     where id = ? and removed_at is not null and files_deleted_at is null`,
  ).all(input.id) as PhotoKeys[];
  try {
    await deleteFiles(ctx, from, left);
  } catch (error) {
    // Nobody sees it any more, which is what was asked for; the tidying lets go of the files.
    log.warn("photo-left-behind", { files: left.length * 2, cause: String(error) });
  }
  return receipt;
}
