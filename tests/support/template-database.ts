/** Migrates one empty database per test run; each test copies the file (never :memory:). */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { migrateDatabase } from "@/db/migrate";
import { buildWorkers } from "@/lib/cli/build-workers.mjs";

export default async function setup(): Promise<() => void> {
  await buildWorkers(path.resolve(import.meta.dirname, "../.."));
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-test-"));
  const file = path.join(folder, "template.db");
  migrateDatabase(file);
  process.env.BISMAR_TEST_TEMPLATE = file;
  process.env.BISMAR_TEST_FOLDER = folder;
  return () => fs.rmSync(folder, { recursive: true, force: true });
}
