/**
 * `npm run photos:tidy`: removes photos that nothing has referred to for a day, goes on with deletions that
 * broke off, and deletes files that no photo refers to. Says what it did.
 */
import { randomUUID } from "node:crypto";
import fs from "node:fs";
import { openDb } from "@/db/client";
import { AppError } from "@/lib/core/errors";
import { sentence } from "@/lib/core/messages";
import { now } from "@/lib/platform/clock";
import { settings } from "@/lib/platform/env";
import { SettingsError } from "@/lib/platform/settings-error";
import { openStorage } from "@/lib/platform/storage";
import { tidyPhotos } from "@/lib/uploads/commands/tidy";

const count = (number: number, one: string, many: string): string =>
  `${number} ${number === 1 ? one : many}`;

async function tidy(): Promise<number> {
  const { databaseFile, storage } = settings();
  if (!fs.existsSync(databaseFile)) {
    process.stderr.write(`There is no database at ${databaseFile}.\n`);
    return 1;
  }
  const db = openDb(databaseFile);
  try {
    const { unreferred, filesDeleted, leftBehind } = await tidyPhotos(
      {
        actor: { kind: "system" },
        now: now(),
        requestId: randomUUID(),
        bodyHash: "",
        address: null,
        db,
      },
      openStorage(storage),
    );
    process.stdout.write(
      unreferred + filesDeleted + leftBehind === 0
        ? "There was nothing to tidy.\n"
        : [
            `${count(unreferred, "photo", "photos")} removed that nothing had referred to for a day.`,
            `The files of ${count(filesDeleted, "removed photo", "removed photos")} deleted.`,
            `${count(leftBehind, "file", "files")} of uploads that broke off deleted.\n`,
          ].join("\n"),
    );
    return 0;
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    process.stderr.write(
      `${sentence(error.code, error.detail)} What was not tidied now is tidied next time.\n`,
    );
    return 1;
  } finally {
    db.close();
  }
}

try {
  process.exitCode = await tidy();
} catch (error) {
  if (!(error instanceof SettingsError)) throw error;
  process.stderr.write(`${error.message}\n`);
  process.exitCode = 1;
}
