/**
 * A million ledger lines against ten thousand: the whole pages of stock and of a one-year report with the same
 * number of cells; and the CSV of a million lines: memory, pauses of the server, time beside `sqlite3 -csv`.
 */
import { spawnSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { MOVEMENTS_SQL } from "@/lib/reports/queries/movements";
import { startE2eServer, type E2eServer } from "@/tests/support/e2e-server";
import type { BenchRow } from "./bench-row";
import { filledDatabase } from "./filled-database";

export const name = "large-ledger";
export const soak = false;

const ROOT = path.resolve(import.meta.dirname, "../..");
const LARGE = 1_000_000;
const SMALL = 10_000;
const ROUNDS = 15;
/** The CSV's address names the day after the last, the page's the last day. */
const YEAR = "from=2025-12-01&until=2026-12-01";
const PAGE_YEAR = "from=2025-12-01&to=2026-11-30";

const median = (values: number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

type Measured = { server: E2eServer; headers: Record<string, string>; delayFile: string };

async function start(file: string, folder: string): Promise<Measured> {
  const delayFile = path.join(folder, `delay-${path.basename(file)}.json`);
  const server = await startE2eServer(
    { file },
    {
      LOOP_DELAY_FILE: delayFile,
      NODE_OPTIONS: `--import ${path.join(ROOT, "tests/bench/loop-delay.mjs")}`,
    },
  );
  const { cookie } = await server.session("coordinator");
  return { server, headers: { cookie: `${cookie.name}=${cookie.value}` }, delayFile };
}

async function page(of: Measured, address: string): Promise<number> {
  const started = performance.now();
  const response = await fetch(of.server.url + address, { headers: of.headers });
  const text = await response.text();
  if (response.status !== 200 || !text.includes("</html>"))
    throw new Error(`${address}: ${response.status}`);
  return performance.now() - started;
}

/** Both servers take turns, so that a change of the machine's speed meets both. */
async function compare(
  large: Measured,
  small: Measured,
  address: string,
): Promise<[number, number]> {
  const times: [number[], number[]] = [[], []];
  for (let round = -3; round < ROUNDS; round += 1) {
    const a = await page(large, address);
    const b = await page(small, address);
    if (round < 0) continue;
    times[0].push(a);
    times[1].push(b);
  }
  return [median(times[0]), median(times[1])];
}

const memoryMb = (pid: number): number =>
  Number(/VmRSS:\s+(\d+)/.exec(fs.readFileSync(`/proc/${pid}/status`, "utf8"))?.[1] ?? 0) / 1024;

async function download(
  of: Measured,
): Promise<{ seconds: number; lines: number; grewMb: number; pauseMs: number }> {
  const pid = of.server.pid();
  await fetch(`${of.server.url}/api/reports/movements.csv?${YEAR}`, { headers: of.headers }).then(
    (r) => r.body?.cancel(),
  );
  await new Promise((resolve) => setTimeout(resolve, 1500));
  fs.rmSync(of.delayFile, { force: true });
  await new Promise((resolve) => setTimeout(resolve, 500));
  const before = memoryMb(pid);
  let most = before;
  const watch = setInterval(() => {
    most = Math.max(most, memoryMb(pid));
  }, 50);
  const started = performance.now();
  const response = await fetch(`${of.server.url}/api/reports/movements.csv?${YEAR}`, {
    headers: of.headers,
  });
  if (!response.ok || !response.body) throw new Error(`movements.csv: ${response.status}`);
  let lines = 0;
  for await (const piece of response.body as unknown as AsyncIterable<Uint8Array>) {
    for (const byte of piece) if (byte === 10) lines += 1;
  }
  const seconds = (performance.now() - started) / 1000;
  clearInterval(watch);
  await new Promise((resolve) => setTimeout(resolve, 500));
  const { maxMs } = JSON.parse(fs.readFileSync(of.delayFile, "utf8")) as { maxMs: number };
  return { seconds, lines, grewMb: most - before, pauseMs: maxMs };
}

/** The same columns of the same lines by the database's own tool, in one go. */
function bySqlite(file: string): number {
  const sql = MOVEMENTS_SQL.replace("(@entryId, @seq)", "(0, 0)")
    .replace("@last", "9999999999")
    .replace("@from", "'2025-12-01'")
    .replace("@until", "'2026-12-01'")
    .replace(/limit \d+/, "");
  const started = performance.now();
  const run = spawnSync("sqlite3", ["-readonly", "-csv", "-header", file, sql], {
    stdio: ["ignore", "ignore", "pipe"],
    encoding: "utf8",
  });
  if (run.status !== 0) throw new Error(`sqlite3: ${run.stderr || String(run.error)}`);
  return (performance.now() - started) / 1000;
}

export async function run(): Promise<BenchRow[]> {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-bench-"));
  const files = { large: filledDatabase(LARGE), small: filledDatabase(SMALL) };
  const large = await start(files.large, folder);
  const small = await start(files.small, folder);
  try {
    const rows: BenchRow[] = [];
    const pages: [string, string][] = [
      ["stock, whole page", "/stock"],
      [
        "one-year report by month, point, polymer and colour, whole page",
        `/reports?${PAGE_YEAR}&by=month,point,polymer,colour`,
      ],
      ["one-year report, totals only, whole page", `/reports?${PAGE_YEAR}`],
    ];
    for (const [figure, address] of pages) {
      const [value, held] = await compare(large, small, address);
      rows.push({
        figure,
        value,
        unit: "ms",
        yardstick: { name: "with 10 000 lines", value: held },
        most: 2,
      });
    }
    await small.server.close();
    const csv = await download(large);
    rows.push(
      { figure: "CSV of every movement: lines", value: csv.lines - 1, unit: "lines", least: LARGE },
      { figure: "CSV: memory of the server grows by", value: csv.grewMb, unit: "MB", most: 50 },
      { figure: "CSV: longest pause of the server", value: csv.pauseMs, unit: "ms", most: 50 },
      {
        figure: "CSV: time",
        value: csv.seconds,
        unit: "s",
        yardstick: { name: "sqlite3 -csv, same query", value: bySqlite(files.large) },
      },
    );
    return rows;
  } finally {
    await large.server.close();
    fs.rmSync(folder, { recursive: true, force: true });
  }
}
