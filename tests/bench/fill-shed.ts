/**
 * Fills a database with a shed as a busy year leaves it: `fill-shed.ts FILE WAITING MOVEMENTS`. So many bags wait
 * to be sorted, and lot 1 was moved so often: by piles of sortings, by bags of one kind, by counts, by splits.
 * Everything goes through the program's own commands, with synchronous=OFF.
 */
import { randomUUID } from "node:crypto";
import { openDb } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { setUpSchemeIn } from "@/lib/cli/set-up-scheme";
import type { LabelCode } from "@/lib/core/bag-code";
import { newId, type PersonId } from "@/lib/core/ids";
import { ROLES } from "@/lib/core/permissions";
import { day, instant, type Instant } from "@/lib/core/time";
import { addPersonIn } from "@/lib/identity/commands/add-people";
import type { Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { addPoint } from "@/lib/points/commands";
import { addScale } from "@/lib/scales/commands/scales";
import { closeSorting } from "@/lib/sorting/commands/close";
import { closeSortingSchema } from "@/lib/sorting/contract/sortings";
import { countLot } from "@/lib/stock/commands/count-lot";
import { splitLot } from "@/lib/stock/commands/move-lot";
import { countLotEndpoint } from "@/lib/stock/contract/counts";
import { splitLotEndpoint } from "@/lib/stock/contract/moves";
import { bookGrams, lastSeen, requireLot } from "@/lib/stock/queries/lot-record";
import { weighBag } from "@/lib/weighing/commands/weigh-bag";
import { weighInInputSchema } from "@/lib/weighing/contract/weigh-ins";

const FIRST_DAY = day("2026-05-01");
const POINTS = 14;
const TAGS_AT_ONCE = 200;
/** So that the acts of the fullest shed fit into half a year. */
const BETWEEN_ACTS_MS = 5 * 60_000;
/** The moved lot holds what comes to it of this. */
const LIDS = { polymer: "PE-HD", kind: "lids", colourCode: "blue" } as const;
const LOT = 1;

const [file, wantedBags, wantedMovements] = process.argv.slice(2);
if (!file || !wantedBags || !wantedMovements) {
  throw new Error("Give a file, a number of waiting bags and a number of movements.");
}
const [waiting, movements] = [Number(wantedBags), Number(wantedMovements)];

migrateDatabase(file);
const db = openDb(file);
db.writer.client.pragma("synchronous = OFF");
let now: Instant = instant(Date.parse(`${FIRST_DAY}T08:00:00Z`));
const as = (actor: Context["actor"]): Context => ({
  actor,
  now,
  requestId: randomUUID(),
  bodyHash: "",
  address: null,
  db,
});
const system = as({ kind: "system" });
const people = inTransaction(system, (tx) => {
  setUpSchemeIn(tx, system, {
    name: "Saltmarsh Plastics Shed",
    timeZone: "UTC",
    firstDay: FIRST_DAY,
  });
  return ROLES.map((role) =>
    addPersonIn(tx, system, {
      name: `Bench ${role}`,
      email: `${role}@saltmarsh.example`,
      role,
      passwordHash: "none",
    }),
  );
});
/** Each act is later than the one before. */
const next = (): Context => {
  now = instant(now + BETWEEN_ACTS_MS);
  const id = people[ROLES.indexOf("coordinator")] as PersonId;
  return as({ kind: "person", id, role: "coordinator", sessionId: null });
};
const requestId = () => newId<"request">(now);

const points = Array.from({ length: POINTS }, (_, index) =>
  addPoint(next(), { requestId: requestId(), name: `Point ${index + 1}`, kind: "other" }),
);
const scale = addScale(next(), {
  requestId: requestId(),
  name: "Bench scale",
  class: "III",
  maxMilligrams: 30_000_000,
  dMilligrams: 5_000,
  eMilligrams: 5_000,
});

const codes: LabelCode[] = [];
let ordered = 0;
function tag(): LabelCode {
  if (codes.length === 0) {
    const point = points[ordered % POINTS];
    const { id } = orderTags(next(), {
      requestId: requestId(),
      count: TAGS_AT_ONCE,
      pointId: point?.id ?? null,
    });
    ordered += 1;
    const drawn = db.reader.client.prepare("select code from bags where order_id = ?").pluck();
    codes.push(...(drawn.all(id) as LabelCode[]));
  }
  const code = codes.pop();
  if (code === undefined) throw new Error("no tag was drawn");
  return code;
}

const onPan = (grams: number) => ({
  grossMilligrams: grams * 1000,
  containerId: null,
  containerTareMilligrams: 0,
  sackId: null,
  sackTareMilligrams: 0,
});

function weigh(grams: number, more: object = {}): LabelCode {
  const code = tag();
  const answer = weighBag(
    next(),
    weighInInputSchema.parse({
      requestId: requestId(),
      code,
      scaleId: scale.id,
      occurredAt: now,
      readings: [onPan(grams)],
      confirmed: ["far-above-usual"],
      ...more,
    }),
  );
  if (answer.kind !== "posted") throw new Error(`a bag was not weighed in: ${answer.kind}`);
  return code;
}

function sortBag(grams: number): void {
  const code = weigh(grams + 600);
  const ctx = next();
  closeSorting(
    ctx,
    closeSortingSchema.parse({
      requestId: requestId(),
      codes: [code],
      scaleId: scale.id,
      occurredAt: now,
      piles: [
        { ...LIDS, reading: onPan(grams) },
        { ...LIDS, polymer: "PP", colourCode: "white", reading: onPan(500) },
      ],
      rejects: [{ reason: "stuck", reading: onPan(100) }],
    }),
  );
}

function count(): void {
  const ctx = next();
  const lot = requireLot(db.reader, LOT);
  // 5 g less than the book, so that it moves something.
  const found = { found: "weighed", scaleId: scale.id, readings: [] as object[] };
  let left = bookGrams(db.reader, lot) - 5;
  for (; left > 20_000; left -= 20_000) found.readings.push(onPan(20_000));
  found.readings.push(onPan(left));
  countLot(
    ctx,
    countLotEndpoint.input.parse({
      requestId: requestId(),
      number: LOT,
      occurredAt: now,
      counted: found,
      seen: lastSeen(db.reader, lot),
    }),
  );
}

function split(grams: number): void {
  const ctx = next();
  splitLot(
    ctx,
    splitLotEndpoint.input.parse({
      requestId: requestId(),
      number: LOT,
      occurredAt: now,
      amount: { scaleId: scale.id, readings: [onPan(grams)] },
    }),
  );
}

const lines = db.reader.client
  .prepare(
    "select count(*) from lines n join lots l on l.holder_id = n.holder_id where l.number = ?",
  )
  .pluck();
for (let made = 0; made < movements; made += 1) {
  const at = made % 10;
  // What came in goes out again, so that the lot stays as heavy as a container can be.
  if (at === 9) split(made < 10 ? 1000 : 1600);
  else if (at === 4) count();
  else if (at % 2 === 0) sortBag(200);
  else weigh(205, { ...LIDS, oneKind: true });
}
if (lines.get(LOT) !== movements) {
  throw new Error(`lot ${LOT} was moved ${String(lines.get(LOT))} times`);
}
for (let made = 0; made < waiting; made += 1) weigh(1500 + (made % 200) * 5);

db.writer.client.pragma("synchronous = FULL");
db.writer.client.pragma("wal_checkpoint(TRUNCATE)");
db.close();
