/** What is cleaned up by itself: photos that nothing refers to, and files that no photo refers to. */
import "server-only";
import { recordAudit } from "@/lib/audit/commands";
import { allow, type Context } from "@/lib/platform/context";
import { inTransaction, prepared } from "@/lib/platform/database";
import type { Storage } from "@/lib/platform/storage";
import { isServedKey } from "../queries/photos";
import { subjectExistsSql } from "../queries/subjects";
import { UNREFERRED_MILLISECONDS } from "../terms";
import { deleteFiles, type PhotoKeys } from "./remove-photo";

export type Tidied = {
  /** Photos whose weigh-in was never saved, or whose subject is gone. */
  unreferred: number;
  /** Removed photos whose files the storage let go of now. */
  filesDeleted: number;
  /** Files in the storage without a photo: of uploads that broke off. */
  leftBehind: number;
};

const AT_ONCE = 100;

type Unreferred = { id: string; subjectKind: string; subjectId: string };

/** In small pieces, so that no other write waits. */
function markUnreferred(ctx: Context): number {
  const before = ctx.now - UNREFERRED_MILLISECONDS;
  let marked = 0;
  for (;;) {
    const count = inTransaction(ctx, (tx) => {
      const rows = prepared(
        tx.client,
        `select p.id, p.subject_kind as subjectKind, p.subject_id as subjectId from photos p
         where p.removed_at is null and p.added_at <= ? and not ${subjectExistsSql("p")}
         limit ${AT_ONCE}`,
      ).all(before) as Unreferred[];
      const mark = prepared(tx.client, "update photos set removed_at = ? where id = ?");
      for (const { id, subjectKind, subjectId } of rows) {
        mark.run(ctx.now, id);
        recordAudit(tx, ctx, {
          action: "photos.tidy",
          subjectKind,
          subjectId,
          fields: { photoId: id },
        });
      }
      return rows.length;
    });
    marked += count;
    if (count === 0) return marked;
  }
}

async function finishDeletions(ctx: Context, storage: Storage): Promise<number> {
  let deleted = 0;
  for (;;) {
    const rows = prepared(
      ctx.db.writer.client,
      `select id, large_key as large, thumb_key as thumb from photos
       where removed_at is not null and files_deleted_at is null limit ${AT_ONCE}`,
    ).all() as PhotoKeys[];
    if (rows.length === 0) return deleted;
    await deleteFiles(ctx, storage, rows);
    deleted += rows.length;
  }
}

/** Younger files may belong to an upload that is under way. */
async function dropLeftBehind(ctx: Context, storage: Storage): Promise<number> {
  const before = ctx.now - UNREFERRED_MILLISECONDS;
  const keys = (await storage.list())
    .filter(({ key, uploadedAt }) => uploadedAt <= before && !isServedKey(ctx.db.writer, key))
    .map(({ key }) => key);
  await storage.remove(keys);
  return keys.length;
}

/**
 * Cleans up. What breaks off is gone on with the next time.
 *
 * @throws AppError `photo-storage-down` when the storage does not answer; what was marked stays marked
 */
export async function tidyPhotos(ctx: Context, storage: Storage): Promise<Tidied> {
  allow(ctx, "photos.remove");
  const unreferred = markUnreferred(ctx);
  const filesDeleted = await finishDeletions(ctx, storage);
  const leftBehind = await dropLeftBehind(ctx, storage);
  return { unreferred, filesDeleted, leftBehind };
}
