/**
 * Saving a weigh-in over HTTP at 8 connections, durable, all checks on, against a bare Next handler and a bare
 * node:http server that write the same rows by hand. The three take turns, so that a change of the machine's
 * speed meets all of them.
 */
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import autocannon from "autocannon";
import Database from "better-sqlite3";
import { drawCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import { startE2eServer } from "@/tests/support/e2e-server";
import type { BenchRow } from "./bench-row";
import { startBareNext, startByHand } from "./servers";

export const name = "save-weigh-in";
export const soak = false;

const CONNECTIONS = 8;
const ROUNDS = 3;
const SECONDS = 5;
const BAGS = 60_000;

/** Thousands of printed tags, put in behind the program's back: only their weighing is measured. */
function addBags(file: string): string[] {
  const client = new Database(file);
  const point = client
    .prepare("select id from points where kind = 'library'")
    .pluck()
    .get() as string;
  const bag = client.prepare(
    "insert into bags (id, code, point_id, state, state_since, printed_at) values (?, ?, ?, 'printed', 0, 0)",
  );
  const label = client.prepare("insert or ignore into labels values (?, 'bag', ?, 0)");
  let seed = 7;
  const random = (below: number): number => {
    seed = (Math.imul(seed, 1_103_515_245) + 12_345) & 0x7fffffff;
    return Math.floor((seed / 0x80000000) * below);
  };
  const codes: string[] = [];
  client.transaction(() => {
    while (codes.length < BAGS) {
      const code = drawCode(random);
      const id = newId<"bag">();
      if (label.run(code, id).changes === 0) continue;
      bag.run(id, code, point);
      codes.push(code);
    }
  })();
  client.close();
  return codes;
}

type Target = {
  label: string;
  url: string;
  headers: Record<string, string>;
  codes: string[];
  body: (code: string) => object;
};
type Figures = { perSecond: number[]; p50: number[]; p99: number[] };

async function fire(target: Target): Promise<{ perSecond: number; p50: number; p99: number }> {
  const result = await autocannon({
    url: target.url,
    method: "POST",
    connections: CONNECTIONS,
    duration: SECONDS,
    headers: { "content-type": "application/json", ...target.headers },
    requests: [
      {
        setupRequest: (request) => {
          const code = target.codes.pop();
          if (!code) throw new Error("out of bags");
          return { ...request, body: JSON.stringify(target.body(code)) };
        },
      },
    ],
  });
  if (result.non2xx > 0 || result.errors > 0) {
    throw new Error(`${target.label}: ${result.non2xx} refused, ${result.errors} failed`);
  }
  return { perSecond: result.requests.average, p50: result.latency.p50, p99: result.latency.p99 };
}

const median = (values: number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

export async function run(): Promise<BenchRow[]> {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "bismar-bench-"));
  const program = await startE2eServer("shed");
  const codes = addBags(program.databaseFile);
  const copies = ["next", "http"].map((which) => {
    const file = path.join(folder, `${which}.db`);
    const client = new Database(program.databaseFile);
    client.prepare("VACUUM INTO ?").run(file);
    client.close();
    return file;
  });
  const bare = await startBareNext(copies[0] ?? "");
  const hand = await startByHand(copies[1] ?? "");
  try {
    const { cookie } = await program.session("volunteer");
    const [{ id: scaleId } = { id: "" }] = program.query<{ id: string }>(
      "select id from scales limit 1",
    );
    const [{ id: helper } = { id: "" }] = program.query<{ id: string }>(
      "select id from people where role = 'volunteer' limit 1",
    );
    const body = (code: string) => ({
      requestId: newId<"weigh-in">(),
      code,
      scaleId,
      helper,
      occurredAt: Date.now(),
      readings: [
        {
          grossMilligrams: 2_160_000,
          containerId: null,
          containerTareMilligrams: 0,
          sackId: null,
          sackTareMilligrams: 0,
        },
      ],
      polymer: "mixed",
      kind: null,
      colourCode: null,
      oneKind: false,
      condition: "clean",
      pointId: null,
      confirmed: [],
    });
    const targets: Target[] = [
      {
        label: "Bismar",
        url: `${program.url}/api/weigh-ins`,
        headers: { cookie: `${cookie.name}=${cookie.value}`, "sec-fetch-site": "same-origin" },
        codes: [...codes],
        body,
      },
      {
        label: "bare Next handler, rows by hand",
        url: `${bare.url}/api/save`,
        headers: {},
        codes: [...codes],
        body,
      },
      { label: "node:http, rows by hand", url: hand.url, headers: {}, codes: [...codes], body },
    ];
    const figures: Figures[] = targets.map(() => ({ perSecond: [], p50: [], p99: [] }));
    for (const target of targets) await fire(target);
    for (let round = 0; round < ROUNDS; round += 1) {
      for (const [index, target] of targets.entries()) {
        const found = await fire(target);
        figures[index]?.perSecond.push(found.perSecond);
        figures[index]?.p50.push(found.p50);
        figures[index]?.p99.push(found.p99);
      }
    }
    const [own, next, http] = figures;
    if (!own || !next || !http) throw new Error("three targets");
    const row = (
      figure: string,
      unit: string,
      pick: (of: Figures) => number[],
      held: Figures,
      label: string,
    ): BenchRow => ({
      figure,
      unit,
      value: median(pick(own)),
      yardstick: { name: label, value: median(pick(held)) },
    });
    const nextLabel = targets[1]?.label ?? "";
    const httpLabel = targets[2]?.label ?? "";
    return [
      { ...row("requests a second", "1/s", (f) => f.perSecond, next, nextLabel), least: 0.8 },
      row("requests a second", "1/s", (f) => f.perSecond, http, httpLabel),
      row("p50", "ms", (f) => f.p50, next, nextLabel),
      row("p50", "ms", (f) => f.p50, http, httpLabel),
      row("p99", "ms", (f) => f.p99, next, nextLabel),
      row("p99", "ms", (f) => f.p99, http, httpLabel),
    ];
  } finally {
    await Promise.all([program.close(), bare.close(), hand.close()]);
    fs.rmSync(folder, { recursive: true, force: true });
  }
}
