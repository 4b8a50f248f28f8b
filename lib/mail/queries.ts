/** How mail stands; and, in the demo and in development, the mails themselves. */
import "server-only";
import fs from "node:fs";
import path from "node:path";
import * as z from "zod";
import { prepared, type Readable } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";

export type MailState = "waiting" | "sent" | "failed";

/**
 * How the latest mail to an address stands; null when there was none. "failed" is given up; a mail that
 * will be tried again is waiting.
 */
export function findMailState(db: Readable, address: string): MailState | null {
  const row = prepared(
    db.client,
    `select sent_at as sentAt, body from outbox where to_address = ? order by id desc limit 1`,
  ).get(address) as { sentAt: number | null; body: string } | undefined;
  if (!row) return null;
  if (row.sentAt !== null) return "sent";
  return row.body === "" ? "failed" : "waiting";
}

const folderMailSchema = z.object({
  id: z.number(),
  at: z.string(),
  to: z.string(),
  subject: z.string(),
  body: z.string(),
});
export type FolderMail = z.output<typeof folderMailSchema>;

/**
 * The newest mails of the local folder, newest first.
 *
 * @returns null when mail goes to a mail server: then there is no such folder and no such page
 */
export function listFolderMail(most = 50): FolderMail[] | null {
  const { mail } = settings();
  if (mail.mode !== "folder") return null;
  if (!fs.existsSync(mail.folder)) return [];
  return fs
    .readdirSync(mail.folder)
    .filter((name) => name.endsWith(".json"))
    .sort()
    .reverse()
    .slice(0, most)
    .map((name) =>
      folderMailSchema.parse(JSON.parse(fs.readFileSync(path.join(mail.folder, name), "utf8"))),
    );
}
