/**
 * What should be promised of which lot, kept beside the program as a plain list, oldest first, and everything that the
 * program says of promises compared with it.
 */
import { expect } from "vitest";
import type { RunReceipt } from "@/lib/production/contract/plans";
import { getPlanStock } from "@/lib/production/queries/plan-stock";
import { listRuns } from "@/lib/production/queries/runs";
import { getStock } from "@/lib/stock/queries/stock";
import type { removalDesk } from "../../support/removal-desk";
import { rows } from "../../support/stock-work";
import type { Workshop } from "../../support/workshop";

export type Held = { runId: string; lot: number; grams: number; lapsesAt: number };
type Lot = { number: number; colour: string; usable: number };

/** The workshop, and beside it what should be promised, oldest first. */
export type World = {
  shop: Workshop;
  desk: ReturnType<typeof removalDesk>;
  runs: RunReceipt[];
  held: Held[];
};

export const lotsOf = ({ shop }: World) =>
  rows(
    shop,
    `select l.number, r.colour_code as colour, m.form = 'flake' and m.wash = 'dry' and r.polymer = 'PE-HD' as usable
       from lots l join materials m on m.id = l.material_id join rows r on r.id = m.row_id order by l.number`,
  ) as Lot[];
export const sum = (list: readonly { grams: number }[]) =>
  list.reduce((of, { grams }) => of + grams, 0);
export const promisedOf = (held: readonly Held[], lot: number) =>
  held.filter((one) => one.lot === lot);

/** What a lot's promises lack, the oldest covered first. */
function shortsOf(held: readonly Held[], lot: number, balance: number): number[] {
  let left = balance;
  return promisedOf(held, lot).map(({ grams }) => {
    const covered = Math.min(left, grams);
    left -= covered;
    return grams - covered;
  });
}

/** The list without what the run's lots do not cover. */
export function withoutShort({ shop, held }: World, runId: string): Held[] {
  const short = new Map(
    [...new Set(held.map(({ lot }) => lot))].flatMap((lot) => {
      const list = shortsOf(held, lot, shop.held(lot));
      return promisedOf(held, lot).map((one, at) => [one, list[at] ?? 0] as const);
    }),
  );
  return held
    .map((one) =>
      one.runId === runId ? { ...one, grams: one.grams - (short.get(one) ?? 0) } : one,
    )
    .filter(({ grams }) => grams > 0);
}

/**
 * Everything that is said of promises, against the list.
 *
 * @returns grams that are promised and not there
 */
export function checkPromises(world: World): number {
  const { shop, held } = world;
  const lots = lotsOf(world).map((lot) => {
    const balance = shop.held(lot.number);
    const promised = shop.promised(lot.number);
    const shorts = shortsOf(held, lot.number, balance);
    expect(
      promised.map(({ runId, grams, shortGrams, lapsesAt }) => [
        runId,
        grams,
        shortGrams,
        lapsesAt,
      ]),
    ).toEqual(
      promisedOf(held, lot.number).map((one, at) => [
        one.runId,
        one.grams,
        shorts[at],
        one.lapsesAt,
      ]),
    );
    const covered = promised.reduce((of, { grams, shortGrams }) => of + grams - shortGrams, 0);
    expect(covered).toBeLessThanOrEqual(balance);
    const short = promised.reduce((of, { shortGrams }) => of + shortGrams, 0);
    expect(short).toBe(Math.max(0, sum(promised) - balance));
    const first = promised.findIndex(({ shortGrams }) => shortGrams > 0);
    if (first >= 0) {
      for (const one of promised.slice(first + 1)) expect(one.shortGrams).toBe(one.grams);
    }
    return { ...lot, balance, short, free: balance - covered };
  });
  const total = (list: typeof lots, of: "balance" | "free") =>
    list.reduce((grams, lot) => grams + lot[of], 0);

  const cells = getStock(shop.ctx("lead"), {}).cells;
  expect(cells.reduce((of, { grams }) => of + grams, 0)).toBe(total(lots, "balance"));
  for (const { grams, reservedGrams } of cells) {
    expect(reservedGrams).toBeGreaterThanOrEqual(0);
    expect(reservedGrams).toBeLessThanOrEqual(grams);
  }
  expect(cells.reduce((of, { grams, reservedGrams }) => of + grams - reservedGrams, 0)).toBe(
    total(lots, "free"),
  );
  const stock = getPlanStock(shop.ctx("lead"), { pieceId: shop.hookId, polymer: "PE-HD" });
  for (const { code, freeGrams, reservedGrams } of stock.colours) {
    const own = lots.filter((lot) => lot.usable && lot.colour === code);
    expect(freeGrams).toBe(total(own, "free"));
    expect(freeGrams + reservedGrams).toBe(total(own, "balance"));
  }
  for (const run of listRuns(shop.ctx("lead"), {}).runs) {
    const own = lots
      .flatMap(({ number }) => shop.promised(number))
      .filter((one) => one.runId === run.id);
    expect(run.reservedGrams).toBe(sum(own));
    expect(run.shortGrams).toBe(own.reduce((of, { shortGrams }) => of + shortGrams, 0));
  }
  return lots.reduce((of, { short }) => of + short, 0);
}
