/** What the ledger stored, in the shapes of the plain model, and whether they are the same. */
import { expect } from "vitest";
import { DIMENSIONS } from "@/lib/ledger/terms";
import {
  partsHeld,
  heldIn,
  touchedHoldings,
  type Book,
} from "@/tests/support/plain-model/movements";
import { COLUMNS, scaleTotals, totalsBy } from "@/tests/support/plain-model/totals";
import type { World } from "./world";

type Row = Record<string, string | number | null>;

export const read = (world: World, sql: string, ...values: (string | number)[]): Row[] =>
  world.scheme.db.reader.client.prepare(sql).all(...values) as Row[];

const sorted = (map: ReadonlyMap<string, unknown>): string[] =>
  [...map].map(([key, value]) => `${key} = ${String(value)}`).sort();

function storedTotals(world: World, table: "totals_day" | "totals_month"): Map<string, number> {
  const found = new Map<string, number>();
  for (const row of read(world, `select * from ${table}`)) {
    for (const column of COLUMNS) {
      const grams = Number(row[column]);
      const at = row.day ?? row.month;
      if (grams !== 0) found.set(`${at}|${row.row_id}|${row.origin_no}|${column}`, grams);
    }
  }
  return found;
}

function modelHoldings(book: Book): { balances: Map<string, number>; parts: Map<string, number> } {
  const balances = new Map<string, number>();
  const parts = new Map<string, number>();
  for (const { holder, material } of touchedHoldings(book)) {
    const grams = heldIn(book, holder, material);
    if (grams !== 0) balances.set(`${holder}|${material}`, grams);
    for (const dim of DIMENSIONS) {
      for (const part of partsHeld(book, holder, material, dim)) {
        parts.set(`${holder}|${material}|${dim}|${part.key}`, part.grams);
      }
    }
  }
  return { balances, parts };
}

const keyed = (
  rows: readonly Row[],
  keys: readonly string[],
  value: string,
): Map<string, unknown> =>
  new Map(rows.map((row) => [keys.map((key) => row[key]).join("|"), row[value]]));

/** Fails unless every entry's days and parts, holding, composition and total is what the plain model says. */
export function expectSame(world: World): void {
  const { book } = world;
  const same = (
    what: string,
    real: ReadonlyMap<string, unknown>,
    model: ReadonlyMap<string, unknown>,
  ) => expect(sorted(real), what).toEqual(sorted(model));

  expect(
    read(
      world,
      "select id, act_id, kind, booked_day, concerns_day, reverses from entries order by id",
    ),
  ).toEqual(
    book.entries.map(({ entry, act, kind, trueDay, day, reverses }) => ({
      id: entry,
      act_id: act,
      kind,
      booked_day: day,
      concerns_day: trueDay === day ? null : trueDay,
      reverses,
    })),
  );
  const moved = new Map<string, number>();
  for (const { entry, account, cause, holder, material, dim, key, grams } of book.movements) {
    const name = [entry, account, cause ?? "", holder ?? "", material, dim, key].join("|");
    moved.set(name, (moved.get(name) ?? 0) + grams);
  }
  same(
    "parts of lines",
    keyed(
      read(
        world,
        `select l.entry_id, account, coalesce(cause, '') cause, coalesce(holder_id, '') holder, material_id, dim, key,
           sum(p.grams) grams
         from lines l join line_parts p using (entry_id, seq) group by 1, 2, 3, 4, 5, 6, 7 having sum(p.grams) <> 0`,
      ),
      ["entry_id", "account", "cause", "holder", "material_id", "dim", "key"],
      "grams",
    ),
    new Map([...moved].filter(([, grams]) => grams !== 0)),
  );
  const model = modelHoldings(book);
  same(
    "balances",
    keyed(
      read(world, "select * from balances where grams <> 0"),
      ["holder_id", "material_id"],
      "grams",
    ),
    model.balances,
  );
  same(
    "compositions",
    keyed(read(world, "select * from parts"), ["holder_id", "material_id", "dim", "key"], "grams"),
    model.parts,
  );
  same("totals by day", storedTotals(world, "totals_day"), totalsBy(book, 10));
  same("totals by month", storedTotals(world, "totals_month"), totalsBy(book, 7));
  same(
    "totals by scale",
    keyed(
      read(
        world,
        `select *, grams || ' g ± ' || mpe_mg || ' mg' as sum from totals_scale where grams <> 0 or mpe_mg <> 0`,
      ),
      ["month", "measure", "basis", "scale_id"],
      "sum",
    ),
    scaleTotals(book),
  );
}
