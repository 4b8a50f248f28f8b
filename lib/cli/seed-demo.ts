/** Fills the demo's database; `npm run demo` calls it once. */
import { seedDemo } from "@/db/seed/demo";
import { openDb } from "@/db/client";
import { now } from "@/lib/platform/clock";
import { inTransaction } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { setUpSchemeIn } from "./set-up-scheme";

const db = openDb(settings().databaseFile);
const started = performance.now();
// A demo that breaks off is thrown away whole, so its thousands of small writes need not wait for the disk.
db.writer.client.pragma("synchronous = OFF");
const summary = await seedDemo(db, now(), (ctx, scheme) =>
  inTransaction(ctx, (tx) => setUpSchemeIn(tx, ctx, scheme)),
);
db.writer.client.pragma("synchronous = FULL");
db.writer.client.pragma("wal_checkpoint(TRUNCATE)");
db.close();
process.stdout.write(
  `${summary.bags} bags weighed, ${summary.sorted} sorted, ${summary.waiting} waiting; ${summary.entries} ledger entries in ${((performance.now() - started) / 1000).toFixed(1)} s.\n`,
);
