/**
 * `npm run ledger:export [-- FILE]`: the ledger as a plain-text journal that hledger reads, to a file or
 * to standard output.
 */
import fs from "node:fs";
import { once } from "node:events";
import { openConnection } from "@/db/client";
import { journalPieces } from "@/lib/ledger/queries/journal";
import { settings } from "@/lib/platform/env";

const target = process.argv[2];
const file = settings().databaseFile;
if (!fs.existsSync(file)) {
  process.stderr.write(`There is no database at ${file}. Nothing was written.\n`);
  process.exit(1);
}
const connection = openConnection(file, "reader");
const out = target ? fs.createWriteStream(target) : process.stdout;
for (const piece of journalPieces(connection)) {
  if (!out.write(piece)) await once(out, "drain");
}
if (target) {
  (out as fs.WriteStream).end();
  await once(out, "finish");
}
connection.client.close();
