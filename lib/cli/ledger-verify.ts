/**
 * `npm run ledger:verify [-- ENTRY HASH]`: proves the ledger, optionally against a head that was noted
 * outside the database. Ends with status 1 and the first bad entry when something is wrong.
 */
import fs from "node:fs";
import { openConnection } from "@/db/client";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { settings } from "@/lib/platform/env";

const file = settings().databaseFile;
if (!fs.existsSync(file)) {
  process.stderr.write(`There is no database at ${file}.\n`);
  process.exit(1);
}
const [entry, hash] = process.argv.slice(2);
if (
  (entry === undefined) !== (hash === undefined) ||
  (entry !== undefined && !/^\d+$/.test(entry))
) {
  process.stderr.write("Give both or neither: npm run ledger:verify -- ENTRY HASH\n");
  process.exit(2);
}
const connection = openConnection(file, "reader");
const found = verifyLedger(
  connection,
  entry && hash ? { entryId: Number(entry), hash } : undefined,
);
connection.client.close();
const size = `${found.entries} entries, ${found.lines} lines, ${found.milliseconds} ms`;
if (found.ok) {
  process.stdout.write(
    `The ledger is right: ${size}.\nHead: entry ${found.headEntry}, ${found.headHash}\n`,
  );
} else {
  process.stderr.write(
    `${found.badEntry === null ? "A stored figure" : `Entry ${found.badEntry}`} is wrong: ${found.problem}.\nRead so far: ${size}.\n`,
  );
  process.exit(1);
}
