/** Runs one bench in a process of its own and writes its rows as JSON: `run-bench.ts FILE REPORT by-name|all`. */
import fs from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import type { Bench } from "./bench-row";

const [file, report, asked] = process.argv.slice(2);
if (!file || !report) throw new Error("Give a bench and where its rows go.");
const bench = (await import(pathToFileURL(path.resolve(file)).href)) as Bench;
if (typeof bench.run !== "function" || typeof bench.soak !== "boolean" || !bench.name) {
  throw new Error(`${file} must export name, soak and run().`);
}
const rows = bench.soak && asked !== "by-name" ? null : await bench.run();
fs.writeFileSync(report, JSON.stringify({ name: bench.name, rows }));
