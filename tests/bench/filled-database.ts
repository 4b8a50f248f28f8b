/** Databases of a given size, kept between runs: filling a million lines takes minutes. */
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";

const ROOT = path.resolve(import.meta.dirname, "../..");
const KEPT = path.join(ROOT, ".cache/bench");

type Filling = {
  script: string;
  /** What a database filled by it rests on beside the script: when one of these changes, it is filled anew. */
  sources: readonly string[];
};

const LEDGER: Filling = {
  script: "tests/bench/fill-ledger.ts",
  sources: ["db/migrations/meta/_journal.json", "db/triggers.sql", "lib/ledger"],
};
const SHED: Filling = {
  script: "tests/bench/fill-shed.ts",
  sources: [
    ...LEDGER.sources,
    "lib/bags/commands",
    "lib/sorting/commands",
    "lib/stock/commands",
    "lib/weighing/commands",
  ],
};

function stampOf({ script, sources }: Filling): string {
  const hash = createHash("sha256");
  const add = (file: string): void => {
    if (fs.statSync(file).isDirectory()) {
      for (const name of fs.readdirSync(file).sort()) add(path.join(file, name));
    } else hash.update(fs.readFileSync(file));
  };
  for (const source of [script, ...sources]) add(path.join(ROOT, source));
  return hash.digest("hex").slice(0, 12);
}

function kept(filling: Filling, name: string, sizes: readonly number[]): string {
  const file = path.join(KEPT, `${name}-${stampOf(filling)}.db`);
  if (fs.existsSync(file)) return file;
  fs.mkdirSync(KEPT, { recursive: true });
  for (const old of fs.readdirSync(KEPT)) {
    if (old.startsWith(`${name}-`)) fs.rmSync(path.join(KEPT, old), { force: true });
  }
  const making = `${file}.making`;
  for (const suffix of ["", "-wal", "-shm"]) fs.rmSync(making + suffix, { force: true });
  execFileSync(
    process.execPath,
    [
      "--conditions=react-server",
      "--import",
      "tsx",
      filling.script,
      making,
      ...sizes.map((size) => String(size)),
    ],
    { cwd: ROOT, stdio: ["ignore", "inherit", "inherit"] },
  );
  fs.renameSync(making, file);
  return file;
}

/** Path of a database of so many ledger lines; not to be written to (copy it). */
export const filledDatabase = (lines: number): string => kept(LEDGER, String(lines), [lines]);

/** Path of a database of a shed where bags wait and one lot was moved so often; not to be written to. */
export const filledShed = (waiting: number, movements: number): string =>
  kept(SHED, `shed-${waiting}-${movements}`, [waiting, movements]);
