/**
 * `npm run backup -- FILE`: a copy of the database while the program runs, proved before it is called one:
 * opened again, checked for integrity, its ledger verified, its SHA-256 printed.
 */
import { createHash } from "node:crypto";
import { once } from "node:events";
import fs from "node:fs";
import path from "node:path";
import { openConnection } from "@/db/client";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { settings } from "@/lib/platform/env";

function fail(message: string): never {
  process.stderr.write(`${message}\n`);
  process.exit(1);
}

const target = process.argv[2];
if (!target) fail("Say where to: npm run backup -- /path/to/copy.db");
const file = path.resolve(target);
if (fs.existsSync(file)) fail(`${file} exists already. Nothing was written; choose another name.`);
const source = settings().databaseFile;
if (!fs.existsSync(source)) fail(`There is no database at ${source}. Nothing was written.`);

const live = openConnection(source, "reader");
// One pass: a copy made in steps starts over whenever the running program writes.
await live.client.backup(file, { progress: () => 0x7fffffff });
live.client.close();

const copy = openConnection(file, "reader");
const integrity: unknown = copy.client.pragma("integrity_check", { simple: true });
const ledger = verifyLedger(copy);
copy.client.close();
for (const suffix of ["-wal", "-shm"]) fs.rmSync(file + suffix, { force: true });
if (integrity !== "ok") fail(`The copy is damaged (${String(integrity)}). Do not keep it.`);
if (!ledger.ok)
  fail(`The copy's ledger is wrong (${ledger.problem}). Keep it, and run npm run ledger:verify.`);

const hash = createHash("sha256");
const stream = fs.createReadStream(file);
stream.on("data", (piece) => hash.update(piece));
await once(stream, "end");
process.stdout.write(
  `Copied to ${file}: ${ledger.entries} entries up to ${ledger.headEntry} (${ledger.headHash}).\nSHA-256 of the file: ${hash.digest("hex")}\n`,
);
