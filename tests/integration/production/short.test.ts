/** Lots that hold less than was promised: who turns short, who is covered again, what the stock says. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { release } from "@/lib/production/commands/reserve";
import { getRunPage } from "@/lib/production/queries/runs";
import { getStock } from "@/lib/stock/queries/stock";
import { refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { rows } from "../../support/stock-work";
import { about, DRY_FLAKE, HOOKS_GRAMS, newWorkshop, type Workshop } from "../../support/workshop";

let shop: Workshop;
beforeEach(() => {
  shop = newWorkshop();
});
afterEach(() => shop.close());

const promises = (of: Workshop) =>
  rows(
    of,
    `select l.number as lot, v.grams, v.state from reservations v join lots l on l.id = v.lot_id order by v.seq`,
  );
describe("a lot that holds less than was promised", () => {
  it("turns the newest promise short first, and is covered again by what comes in", () => {
    const lot = shop.fill(2000, DRY_FLAKE);
    const runs = [shop.plan(), shop.plan(), shop.plan()];
    runs.forEach((run, at) =>
      shop.reserve(run, [{ number: lot, grams: [900, 700, 400][at] ?? 0 }]),
    );
    expect(shop.shorts(lot)).toEqual([
      [900, 0],
      [700, 0],
      [400, 0],
    ]);
    shop.recount(lot, 1700);
    expect(shop.shorts(lot)).toEqual([
      [900, 0],
      [700, 0],
      [400, 300],
    ]);
    shop.recount(lot, 1000);
    expect(shop.shorts(lot)).toEqual([
      [900, 0],
      [700, 600],
      [400, 400],
    ]);
    expect(getRunPage(shop.ctx("lead"), 2)?.run).toMatchObject({
      reservedGrams: 700,
      shortGrams: 600,
    });
    expect(refusalOf(() => shop.reserve(shop.plan()))).toBe("nothing-free");
    shop.fill(700, DRY_FLAKE);
    expect(shop.shorts(lot)).toEqual([
      [900, 0],
      [700, 0],
      [400, 300],
    ]);
    shop.recount(lot, "empty");
    expect(shop.shorts(lot)).toEqual([
      [900, 900],
      [700, 700],
      [400, 400],
    ]);
  });

  it("covers the younger again when the elder is given back", () => {
    const lot = shop.fill(1000, DRY_FLAKE);
    const [elder, younger] = [shop.plan(), shop.plan()];
    shop.reserve(elder, [{ number: lot, grams: 600 }]);
    shop.reserve(younger, [{ number: lot, grams: 400 }]);
    shop.recount(lot, 500);
    expect(shop.shorts(lot)).toEqual([
      [600, 100],
      [400, 400],
    ]);
    const input = about(elder);
    release(shop.ctx("lead", NOON, input), input);
    expect(shop.shorts(lot)).toEqual([[400, 0]]);
  });

  it("lets its run look for what is missing elsewhere, without promising it twice", () => {
    const lot = shop.fillAnother(1500);
    const run = shop.plan();
    shop.reserve(run);
    shop.recount(lot, 1000);
    const other = shop.fillAnother(900, "blue", 1);
    expect(shop.reserve(run)).toMatchObject({ picks: [{ number: other, grams: 176 }] });
    expect(shop.shorts(lot)).toEqual([[1000, 0]]);
    expect(getRunPage(shop.ctx("lead"), 1)?.run).toMatchObject({
      reservedGrams: HOOKS_GRAMS,
      shortGrams: 0,
    });
    shop.recount(other, "empty");
    shop.recount(lot, "empty");
    const last = shop.fillAnother(5000, "blue", 2);
    expect(shop.reserve(run)).toMatchObject({ picks: [{ number: last, grams: HOOKS_GRAMS }] });
    expect(promises(shop).filter((one) => (one as { state: string }).state === "held")).toEqual([
      { lot: last, grams: HOOKS_GRAMS, state: "held" },
    ]);
  });

  it("keeps what is short while nothing else is free", () => {
    const lot = shop.fill(1500, DRY_FLAKE);
    const run = shop.plan();
    shop.reserve(run);
    shop.recount(lot, 1000);
    expect(refusalOf(() => shop.reserve(run))).toBe("nothing-free");
    expect(shop.shorts(lot)).toEqual([[HOOKS_GRAMS, 176]]);
  });
});

describe("stock and reservations", () => {
  it("shows the reserved part, and never more of it than is on the shelf", () => {
    const lot = shop.fill(2000, DRY_FLAKE);
    shop.fill(500);
    shop.reserve(shop.plan());
    const blue = () =>
      getStock(shop.ctx("volunteer"), {}).cells.map(({ grams, reservedGrams }) => [
        grams,
        reservedGrams,
      ]);
    expect(blue()).toEqual([[2500, 1176]]);
    expect(getStock(shop.ctx("volunteer"), { form: "whole" }).cells).toMatchObject([
      { grams: 500, reservedGrams: 0 },
    ]);
    shop.recount(lot, 1000);
    expect(blue()).toEqual([[1500, 1000]]);
  });
});
