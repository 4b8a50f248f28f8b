/** Databases of a given number of ledger lines, kept between runs: filling a million takes minutes. */
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";

const ROOT = path.resolve(import.meta.dirname, "../..");
const KEPT = path.join(ROOT, ".cache/bench");

/** What a filled database rests on: when one of these changes, it is filled anew. */
const SOURCES = [
  "db/migrations/meta/_journal.json",
  "db/triggers.sql",
  "tests/bench/fill-ledger.ts",
  "lib/ledger",
];

function stamp(): string {
  const hash = createHash("sha256");
  const add = (file: string): void => {
    if (fs.statSync(file).isDirectory()) {
      for (const name of fs.readdirSync(file).sort()) add(path.join(file, name));
    } else hash.update(fs.readFileSync(file));
  };
  for (const source of SOURCES) add(path.join(ROOT, source));
  return hash.digest("hex").slice(0, 12);
}

/** Path of a filled database; not to be written to (copy it). */
export function filledDatabase(lines: number): string {
  const file = path.join(KEPT, `${lines}-${stamp()}.db`);
  if (fs.existsSync(file)) return file;
  fs.mkdirSync(KEPT, { recursive: true });
  for (const old of fs.readdirSync(KEPT)) {
    if (old.startsWith(`${lines}-`)) fs.rmSync(path.join(KEPT, old), { force: true });
  }
  const making = `${file}.making`;
  for (const suffix of ["", "-wal", "-shm"]) fs.rmSync(making + suffix, { force: true });
  execFileSync(
    process.execPath,
    [
      "--conditions=react-server",
      "--import",
      "tsx",
      "tests/bench/fill-ledger.ts",
      making,
      String(lines),
    ],
    { cwd: ROOT, stdio: ["ignore", "inherit", "inherit"] },
  );
  fs.renameSync(making, file);
  return file;
}
