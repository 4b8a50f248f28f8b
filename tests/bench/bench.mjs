/**
 * `npm run bench [NAME]`: every tests/bench/NAME.bench.ts but soaks, or the one that is named. Prints each figure
 * beside its yardstick; times vary with the machine, ratios much less.
 */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { buildWorkers } from "../../lib/cli/build-workers.mjs";
import { installIfNeeded } from "../../lib/cli/install.mjs";
import { endWithSignals, runToEnd } from "../../lib/cli/own-processes.mjs";
import { LOGS, ROOT, cleanEnvironment } from "../support/steps.mjs";

const FOLDER = path.join(ROOT, "tests/bench");
const SUFFIX = ".bench.ts";

/** Three digits that mean something. */
function shown(value) {
  if (!Number.isFinite(value)) return String(value);
  if (Number.isInteger(value)) return value.toLocaleString("en").replaceAll(",", " ");
  return Math.abs(value) >= 100 ? value.toFixed(0) : value.toPrecision(3);
}

/** @returns {boolean} is the row within what it promises? */
function tellRow({ figure, value, unit, yardstick, most, least }) {
  const ratio = yardstick ? value / yardstick.value : value;
  const kept = (most === undefined || ratio <= most) && (least === undefined || ratio >= least);
  const parts = [`  ${figure}: ${shown(value)} ${unit}`];
  if (yardstick)
    parts.push(`${yardstick.name}: ${shown(yardstick.value)} ${unit}`, `ratio ${ratio.toFixed(2)}`);
  if (most !== undefined) parts.push(`at most ${most}: ${kept ? "kept" : "MISSED"}`);
  if (least !== undefined) parts.push(`at least ${least}: ${kept ? "kept" : "MISSED"}`);
  console.log(parts.join(" | "));
  return kept;
}

async function runBench(name, asked) {
  const report = path.join(LOGS, `bench-${name}.json`);
  fs.rmSync(report, { force: true });
  const started = Date.now();
  const flags = ["--expose-gc", "--conditions=react-server", "--import", "tsx"];
  const code = await runToEnd(
    process.execPath,
    [
      ...flags,
      "tests/bench/run-bench.ts",
      path.join(FOLDER, name + SUFFIX),
      report,
      asked ? "by-name" : "all",
    ],
    {
      cwd: ROOT,
      env: cleanEnvironment({ BISMAR_MODE: "test" }),
      stdio: ["ignore", "inherit", "inherit"],
    },
  );
  if (code !== 0 || !fs.existsSync(report)) {
    console.log(`${name}: FAILED (exit code ${code})\n`);
    return false;
  }
  const { rows } = JSON.parse(fs.readFileSync(report, "utf8"));
  if (rows === null) {
    console.log(`${name}: a soak, runs only by name: npm run bench ${name}\n`);
    return true;
  }
  console.log(`${name} (${((Date.now() - started) / 1000).toFixed(1)} s)`);
  const kept = rows.map(tellRow);
  console.log("");
  return kept.length > 0 && kept.every(Boolean);
}

const started = Date.now();
endWithSignals();
await installIfNeeded(ROOT);
await buildWorkers(ROOT);
fs.mkdirSync(LOGS, { recursive: true });
const known = fs
  .readdirSync(FOLDER)
  .filter((file) => file.endsWith(SUFFIX))
  .map((file) => file.slice(0, -SUFFIX.length))
  .sort();
const asked = process.argv[2];
if (asked !== undefined && !known.includes(asked)) {
  console.error(`There is no bench ${asked}. There are: ${known.join(", ") || "none yet"}.`);
  process.exitCode = 2;
} else {
  console.log(
    `${os.cpus().length} cores, ${os.cpus()[0]?.model ?? "unknown processor"}, Node ${process.version}\n`,
  );
  let missed = 0;
  for (const name of asked === undefined ? known : [asked]) {
    if (!(await runBench(name, asked !== undefined))) missed += 1;
  }
  console.log(
    missed === 0
      ? `Everything kept, in ${((Date.now() - started) / 1000).toFixed(0)} s.`
      : `${missed} of ${asked === undefined ? known.length : 1} benches missed something or failed.`,
  );
  process.exitCode = missed === 0 ? 0 : 1;
}
