/**
 * Fills a database with a year of weigh-ins and sortings of as many ledger lines as asked for, through the
 * ledger's own post, with synchronous=OFF: `fill-ledger.ts FILE LINES`. Both sizes have the same points,
 * materials, lots and months, so reports of them have the same number of cells.
 */
import { randomUUID } from "node:crypto";
import { openDb } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { setUpSchemeIn } from "@/lib/cli/set-up-scheme";
import { CODE_SYMBOLS } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import { ROLES } from "@/lib/core/permissions";
import { addDays, day, instant, type Instant } from "@/lib/core/time";
import { addPersonIn } from "@/lib/identity/commands/add-people";
import { ensureHolder, ensureMaterial, ensureOrigin } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import type { Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { addPoint } from "@/lib/points/commands";
import { lotForMaterialIn } from "@/lib/stock/commands/lots";

const POINTS = 14;
const COLOURS = ["white", "black", "red", "yellow", "green", "blue"] as const;
const POLYMERS = ["PE-HD", "PP"] as const;
const PILES = COLOURS.length * POLYMERS.length;
/** weigh-in 2, sort: bag, twelve piles, reject bin, difference. */
const LINES_A_BAG = 2 + PILES + 3;
const FIRST_DAY = day("2025-12-01");
const DAYS = 365;
/** Small transactions are what costs time here, not what is measured. */
const BAGS_AT_ONCE = 50;

const [file, wanted] = process.argv.slice(2);
if (!file || !wanted) throw new Error("Give a file and a number of lines.");
const bags = Math.ceil(Number(wanted) / LINES_A_BAG);

migrateDatabase(file);
const db = openDb(file);
db.writer.client.pragma("synchronous = OFF");
const start = instant(Date.parse(`${FIRST_DAY}T08:00:00Z`));
const at = (now: Instant): Context => ({
  actor: { kind: "system" },
  now,
  requestId: randomUUID(),
  bodyHash: "",
  address: null,
  db,
});
const ctx = at(start);
inTransaction(ctx, (tx) => {
  setUpSchemeIn(tx, ctx, { name: "Saltmarsh Plastics Shed", timeZone: "UTC", firstDay: FIRST_DAY });
  for (const role of ROLES) {
    addPersonIn(tx, ctx, {
      name: `Bench ${role}`,
      email: `${role}@saltmarsh.example`,
      role,
      passwordHash: "none",
    });
  }
});
const points = Array.from({ length: POINTS }, (_, index) =>
  addPoint(ctx, { requestId: newId<"point">(start), name: `Point ${index + 1}`, kind: "other" }),
);
const { origins, lots, bin } = inTransaction(ctx, (tx) => ({
  origins: points.map((point) => ensureOrigin(tx, "donated", point.id)),
  bin: ensureHolder(tx, "reject-bin", "REJECT-BIN-1"),
  lots: POLYMERS.flatMap((polymer) =>
    COLOURS.map((colourCode) => {
      const materialId = ensureMaterial(tx, {
        polymer,
        kind: "lids",
        colourCode,
        form: "whole",
        wash: "as-received",
      });
      return { materialId, holderId: lotForMaterialIn(tx, ctx, materialId).holderId };
    }),
  ),
}));

/** A holder's code of eight symbols from a number; the check character does not matter here. */
function codeOf(number: number): string {
  let text = "";
  for (let left = number, place = 0; place < 8; place += 1, left = Math.floor(left / 32)) {
    text = (CODE_SYMBOLS[left % 32] ?? "0") + text;
  }
  return text;
}

for (let first = 0; first < bags; first += BAGS_AT_ONCE) {
  inTransaction(ctx, (tx) => {
    for (let bag = first; bag < Math.min(bags, first + BAGS_AT_ONCE); bag += 1) {
      const onDay = addDays(FIRST_DAY, Math.floor((bag / bags) * DAYS));
      const occurredAt = instant(Date.parse(`${onDay}T10:00:00Z`));
      const meta = { now: occurredAt, doneBy: "bench", sentBy: "bench", device: null };
      const holderId = ensureHolder(tx, "bag", codeOf(bag));
      const pile = 100 + (bag % 40);
      const net = PILES * pile + 55;
      const reading = { basis: "unchecked", scaleNumber: 1, mpeMilligrams: 10_000 } as const;
      postAct(tx, meta, [
        {
          kind: "weigh-in",
          occurredAt,
          subject: `bench:${bag}`,
          lines: [
            {
              account: "source",
              originNo: origins[bag % POINTS] ?? 0,
              materialId: UNSORTED,
              grams: -net,
              ...reading,
            },
            { account: "bag", holderId, materialId: UNSORTED, grams: net },
          ],
        },
        {
          kind: "sort",
          occurredAt,
          subject: `bench:${bag}`,
          lines: [
            { account: "bag", holderId, materialId: UNSORTED, grams: -net },
            ...lots.map((lot) => ({ account: "lot" as const, ...lot, grams: pile, ...reading })),
            { account: "reject-bin", holderId: bin, materialId: REJECT, grams: 50, ...reading },
            { account: "difference", grams: 5 },
          ],
        },
      ]);
    }
  });
}
db.writer.client.pragma("synchronous = FULL");
db.writer.client.pragma("wal_checkpoint(TRUNCATE)");
db.close();
