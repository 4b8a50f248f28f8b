/**
 * A busy shed against a quiet one, over HTTP: the sorting queue with 5 000 waiting bags against ten, a lot with
 * 20 000 movements against ten; and a session of twelve piles saved against a weigh-in, in turns.
 */
import { newId } from "@/lib/core/ids";
import { startE2eServer, type E2eServer } from "@/tests/support/e2e-server";
import type { BenchRow } from "./bench-row";
import { filledShed } from "./filled-database";

export const name = "sorting-and-lots";
export const soak = false;

const WAITING = 5_000;
const MOVEMENTS = 20_000;
const FEW = 10;
const ROUNDS = 40;
const SAVES = 150;
const LOT = 1;
const WARM_UP = 5;
const COLOURS = ["white", "black", "red", "yellow", "green", "blue"] as const;
const POLYMERS = ["PE-HD", "PP"] as const;
const PILE_GRAMS = 150;
const PILES = COLOURS.length * POLYMERS.length;

const median = (values: number[]): number =>
  [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

type Caller = { server: E2eServer; headers: Record<string, string> };

async function start(file: string): Promise<Caller> {
  const server = await startE2eServer({ file });
  const { cookie } = await server.session("coordinator");
  return { server, headers: { cookie: `${cookie.name}=${cookie.value}` } };
}

async function get(of: Caller, address: string): Promise<string> {
  const response = await fetch(of.server.url + address, { headers: of.headers });
  const text = await response.text();
  if (response.status !== 200) throw new Error(`${address}: ${response.status}`);
  return text;
}

async function send<Answer>(of: Caller, address: string, body: object): Promise<Answer> {
  const response = await fetch(of.server.url + address, {
    method: "POST",
    headers: {
      ...of.headers,
      "content-type": "application/json",
      "sec-fetch-site": "same-origin",
    },
    body: JSON.stringify({ requestId: newId<"request">(), ...body }),
  });
  const text = await response.text();
  if (response.status !== 200) throw new Error(`${address}: ${response.status} ${text}`);
  return JSON.parse(text) as Answer;
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const started = performance.now();
  await work();
  return performance.now() - started;
}

/** Both take turns, and each goes first every other time, so that a change of the machine's speed meets both. */
async function inTurns(
  rounds: number,
  one: () => Promise<unknown>,
  other: () => Promise<unknown>,
): Promise<[number, number]> {
  const times: [number[], number[]] = [[], []];
  for (let round = -WARM_UP; round < rounds; round += 1) {
    const swapped = round % 2 !== 0;
    const first = await timed(swapped ? other : one);
    const second = await timed(swapped ? one : other);
    if (round < 0) continue;
    times[0].push(swapped ? second : first);
    times[1].push(swapped ? first : second);
  }
  return [median(times[0]), median(times[1])];
}

type Listed = { next: string | null };

/** Where the last page of a list begins. */
async function lastPage(of: Caller, address: (at: string) => string): Promise<string> {
  for (let at = ""; ;) {
    const { next } = JSON.parse(await get(of, address(at))) as Listed;
    if (next === null) return at;
    at = next;
  }
}

const queueFrom = (at: string): string => `/api/sortings/waiting${at ? `?after=${at}` : ""}`;
const movementsFrom = (at: string): string =>
  `/api/lots/${LOT}/movements${at ? `?before=${at}` : ""}`;

async function pageRows(busy: Caller, quiet: Caller): Promise<BenchRow[]> {
  const deepInQueue = await lastPage(busy, queueFrom);
  const deepInLot = await lastPage(busy, movementsFrom);
  const queuePage = async (of: Caller, list: string): Promise<void> => {
    await get(of, "/sorting");
    await get(of, list);
  };
  const lotPage = `/stock/lots/${LOT}`;
  const compared: [string, string, () => Promise<unknown>, () => Promise<unknown>][] = [
    [
      "sorting queue, page and its list",
      "ten bags wait",
      () => queuePage(busy, queueFrom("")),
      () => queuePage(quiet, queueFrom("")),
    ],
    [
      "sorting queue, page and the last page of its list",
      "ten bags wait",
      () => queuePage(busy, queueFrom(deepInQueue)),
      () => queuePage(quiet, queueFrom("")),
    ],
    ["a lot's whole page", "ten movements", () => get(busy, lotPage), () => get(quiet, lotPage)],
    [
      "a lot's whole page at its first movements",
      "ten movements",
      () => get(busy, `${lotPage}?before=${deepInLot}`),
      () => get(quiet, lotPage),
    ],
  ];
  const rows: BenchRow[] = [];
  for (const [figure, held, large, small] of compared) {
    const [value, other] = await inTurns(ROUNDS, large, small);
    rows.push({ figure, value, unit: "ms", yardstick: { name: held, value: other }, most: 2 });
  }
  // Without the page around them, of which most is the same.
  for (const [figure, held, busyList, quietList] of [
    ["sorting queue, its list alone", "ten bags wait", queueFrom(""), queueFrom("")],
    ["a lot's movements alone", "ten movements", movementsFrom(""), movementsFrom("")],
  ] as const) {
    const [value, other] = await inTurns(
      ROUNDS,
      () => get(busy, busyList),
      () => get(quiet, quietList),
    );
    rows.push({ figure, value, unit: "ms", yardstick: { name: held, value: other } });
  }
  return rows;
}

const onPan = (grams: number) => ({
  grossMilligrams: grams * 1000,
  containerId: null,
  containerTareMilligrams: 0,
  sackId: null,
  sackTareMilligrams: 0,
});

/** Durable, all checks on, one after another: first a weigh-in, then the sorting of that bag. */
async function savingRow(of: Caller): Promise<BenchRow> {
  const [scale] = of.server.query<{ id: string }>("select id from scales limit 1");
  const [point] = of.server.query<{ id: string }>(
    "select id from points where kind = 'other' limit 1",
  );
  if (!scale || !point) throw new Error("no scale or no point");
  const { id } = await send<{ id: string }>(of, "/api/tag-orders", {
    count: SAVES + WARM_UP,
    pointId: point.id,
  });
  const codes = of.server
    .query<{ code: string }>("select code from bags where order_id = ?", id)
    .map(({ code }) => code);
  const times: [number[], number[]] = [[], []];
  for (const [at, code] of codes.entries()) {
    const weighing = await timed(() =>
      send(of, "/api/weigh-ins", {
        code,
        scaleId: scale.id,
        occurredAt: Date.now(),
        readings: [onPan(PILES * PILE_GRAMS + 50)],
        confirmed: ["far-above-usual"],
      }),
    );
    const sorting = await timed(() =>
      send(of, "/api/sortings", {
        codes: [code],
        scaleId: scale.id,
        occurredAt: Date.now(),
        piles: POLYMERS.flatMap((polymer) =>
          COLOURS.map((colourCode) => ({
            polymer,
            colourCode,
            kind: "lids",
            reading: onPan(PILE_GRAMS),
          })),
        ),
        rejects: [{ reason: "stuck", reading: onPan(50) }],
      }),
    );
    if (at < WARM_UP) continue;
    times[0].push(sorting);
    times[1].push(weighing);
  }
  return {
    figure: `saving a session of ${PILES} piles`,
    value: median(times[0]),
    unit: "ms",
    yardstick: { name: "saving a weigh-in", value: median(times[1]) },
    most: 3,
  };
}

export async function run(): Promise<BenchRow[]> {
  const busy = await start(filledShed(WAITING, MOVEMENTS));
  const quiet = await start(filledShed(FEW, FEW));
  try {
    return [...(await pageRows(busy, quiet)), await savingRow(busy)];
  } finally {
    await Promise.all([busy.server.close(), quiet.server.close()]);
  }
}
