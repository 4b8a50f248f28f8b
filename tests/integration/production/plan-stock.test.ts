/** What the stock has for a piece: free, reserved, heated before, after steps, and what usually comes in. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { addDays, day, instant } from "@/lib/core/time";
import { ensureHolder } from "@/lib/ledger/commands/define";
import { postAct, reverseAct } from "@/lib/ledger/commands/post";
import { inTransaction, type Tx } from "@/lib/platform/database";
import type { ColourStock } from "@/lib/production/contract/plans";
import { getPlanStock } from "@/lib/production/queries/plan-stock";
import { judgeBlend } from "@/lib/production/rules/enough";
import { countLot } from "@/lib/stock/commands/count-lot";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { refusalOf } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { all, count, out, rows, save } from "../../support/stock-work";
import { DRY_FLAKE, newWorkshop, type Workshop } from "../../support/workshop";

const DAY = 24 * 60 * 60 * 1000;
const daysAgo = (days: number) => instant(NOON - days * DAY);

let shop: Workshop;
beforeEach(() => {
  shop = newWorkshop();
});
afterEach(() => shop.close());

const stockFor = (pieceId = shop.hookId, polymer: "PE-HD" | "PP" = "PE-HD") =>
  getPlanStock(shop.ctx("volunteer"), { pieceId, polymer });
const colourOf = (code: string, pieceId = shop.hookId): ColourStock => {
  const found = stockFor(pieceId).colours.find((colour) => colour.code === code);
  if (!found) throw new Error(`no ${code}`);
  return found;
};

/** Runs grams of a lot through heat and back into it. */
function heat(number: number, grams: number): void {
  const lot = getLotRecord(shop.db.reader, number);
  if (!lot) throw new Error(`no lot ${number}`);
  const { holderId, materialId } = lot;
  inTransaction(shop, (tx: Tx) => {
    const meta = { now: NOON, doneBy: shop.people.lead, sentBy: shop.people.lead, device: null };
    const run = ensureHolder(tx, "run", newId(NOON));
    const subject = `run:${newId(NOON)}`;
    const move = (kind: "draw" | "finish", sign: number) => ({
      kind,
      occurredAt: NOON,
      subject,
      lines: [
        { account: "lot" as const, holderId, materialId, grams: -sign * grams },
        { account: "run" as const, holderId: run, materialId, grams: sign * grams },
      ],
    });
    postAct(tx, meta, [move("draw", 1), move("finish", -1)]);
  });
}

describe("stock for a piece", () => {
  it("is free and reserved by colour: what the method takes as it is, of the piece's kinds and polymer", () => {
    shop.fill(2000, DRY_FLAKE);
    shop.fill(500, { ...DRY_FLAKE, kind: "tubs" });
    shop.fill(900, { ...DRY_FLAKE, colour: "white" });
    shop.fill(9000, { ...DRY_FLAKE, kind: "film" });
    shop.fill(9000, { ...DRY_FLAKE, polymer: "PP" });
    shop.reserve(shop.plan());
    expect(colourOf("blue")).toMatchObject({
      name: "Blue",
      freeGrams: 2500 - 1176,
      reservedGrams: 1176,
      heatedGrams: 0,
      kinds: ["lids", "tubs"],
      afterSteps: [],
    });
    expect(colourOf("white")).toMatchObject({ freeGrams: 900, reservedGrams: 0, kinds: ["lids"] });
    expect(colourOf("red")).toMatchObject({ freeGrams: 0, reservedGrams: 0, kinds: [] });
    const pp = stockFor(shop.hookId, "PP").colours.find(({ code }) => code === "blue");
    expect(pp).toMatchObject({ freeGrams: 9000 });
    expect(stockFor().today).toBe("2026-05-06");
  });

  it("never counts a promise that the lot no longer covers as free or as more than is held", () => {
    const lot = shop.fill(2000, DRY_FLAKE);
    shop.db.writer.client
      .prepare("update lots set closed_at = ?, closed_for = 'full' where number = ?")
      .run(NOON, lot);
    shop.fill(300, DRY_FLAKE);
    shop.reserve(shop.plan(), [{ number: lot, grams: 1800 }]);
    const input = count(shop, lot, 1000);
    countLot(shop.ctx("volunteer", NOON, input), input);
    expect(colourOf("blue")).toMatchObject({ freeGrams: 300, reservedGrams: 1000 });
  });

  it("tells what was heated before, for the piece's largest share", () => {
    const lot = shop.fill(2000, DRY_FLAKE);
    heat(lot, 900);
    expect(shop.held(lot)).toBe(2000);
    const blue = colourOf("blue");
    expect(blue).toMatchObject({ freeGrams: 2000, heatedGrams: 900 });
    heat(lot, 2000);
    expect(colourOf("blue").heatedGrams).toBe(2000);
  });

  it("keeps a retired colour as long as something of it is there", () => {
    shop.fill(500, DRY_FLAKE);
    const retire = shop.db.writer.client.prepare(
      "update colours set retired_at = ? where code = ?",
    );
    retire.run(NOON, "blue");
    retire.run(NOON, "white");
    expect(colourOf("blue").freeGrams).toBe(500);
    expect(stockFor().colours.some(({ code }) => code === "white")).toBe(false);
    expect(stockFor().colours[0]).not.toHaveProperty("retired");
  });

  it("is for those who may see runs, of a piece that is there", () => {
    const input = { pieceId: shop.hookId, polymer: "PE-HD" as const };
    expect(refusalOf(() => getPlanStock(shop.ctx("donor"), input))).toBe("forbidden");
    expect(refusalOf(() => getPlanStock(shop.ctx("nobody"), input))).toBe("signed-out");
    expect(refusalOf(() => stockFor(newId()))).toBe("not-found");
  });
});

describe("what steps would add", () => {
  it("is told by the steps, without what they lose while the scheme has no loss of its own", () => {
    shop.fill(1000);
    shop.fill(200, { form: "offcut" });
    shop.fill(300, { form: "flake", wash: "washed" });
    shop.fill(400, { form: "whole", wash: "dry" });
    expect(colourOf("blue")).toMatchObject({ freeGrams: 0, kinds: [] });
    const steps = colourOf("blue").afterSteps.map((one) => [
      one.steps.join(),
      one.grams,
      one.gives,
    ]);
    expect(steps.sort()).toEqual([
      ["drying", 300, 300],
      ["shredding", 400, 400],
      ["washing,drying,shredding", 1200, 1200],
    ]);
    expect(stockFor().keepsThousandths).toBe(1000);
  });

  it("counts the scheme's own loss of each step", () => {
    const step = (kind: "washing" | "drying" | "shredding", material: object, given: number) =>
      save(shop, {
        kind,
        inputs: [all(shop.fill(1000, material))],
        outputs: [out(shop, given)],
        cause: "dust",
        confirmed: true,
      });
    step("washing", { colour: "white" }, 950);
    step("drying", { colour: "red", wash: "washed" }, 900);
    step("shredding", { colour: "grey", wash: "dry" }, 980);
    shop.fill(1000);
    // 0.95 × 0.9 × 0.98
    expect(stockFor().keepsThousandths).toBe(838);
    expect(colourOf("blue").afterSteps).toEqual([
      { steps: ["washing", "drying", "shredding"], grams: 1000, gives: 837 },
    ]);
    expect(stockFor(shop.sheetId).keepsThousandths).toBe(1000);
  });

  it("leads to no sheet: pressing takes all as it is, cutting waits for what is pressed", () => {
    for (let week = 1; week <= 12; week += 1) shop.fill(700, {}, 0, daysAgo(7 * week));
    expect(colourOf("blue", shop.sheetId)).toMatchObject({ freeGrams: 8400, afterSteps: [] });
    expect(colourOf("blue", shop.markerId)).toMatchObject({ freeGrams: 0, afterSteps: [] });
    const blend = [{ colourCode: "blue", thousandths: 1000 }];
    expect(judgeBlend(9100, blend, stockFor(shop.sheetId))[0]?.due?.day).toBe("2026-05-13");
    expect(judgeBlend(9100, blend, stockFor(shop.markerId))[0]).toMatchObject({
      shortGrams: 9100,
      due: null,
    });
    shop.fill(144, { form: "sheet" });
    expect(colourOf("blue", shop.markerId).freeGrams).toBe(144);
  });
});

describe("what usually comes in", () => {
  it("is what was accepted in each of the last twelve full weeks, today left out", () => {
    const first = addDays(day("2026-05-06"), -84);
    const on = (back: number, grams: number, more = {}) => shop.fill(grams, more, 0, daysAgo(back));
    on(200, 5);
    on(84, 100);
    on(78, 20);
    on(77, 300);
    on(8, 40);
    on(7, 50);
    on(1, 60);
    on(0, 9000);
    on(1, 7, { kind: "tubs" });
    on(1, 9000, { kind: "film" });
    on(1, 9000, { polymer: "PP" });
    expect(first).toBe("2026-02-11");
    expect(colourOf("blue").weeks).toEqual([120, 300, 0, 0, 0, 0, 0, 0, 0, 0, 40, 117]);
    expect(colourOf("white").weeks).toEqual(Array.from({ length: 12 }, () => 0));
  });

  it("starts with the first full week that the scheme has", () => {
    expect(colourOf("blue").weeks).toEqual([]);
    shop.fill(100, {}, 0, daysAgo(20));
    shop.fill(200, {}, 0, daysAgo(2));
    expect(colourOf("blue").weeks).toEqual([0, 200]);
    expect(colourOf("red").weeks).toEqual([0, 0]);
  });

  it("is less by what was taken back", () => {
    shop.fill(10, {}, 0, daysAgo(30));
    shop.fill(700, {}, 0, daysAgo(10));
    const [{ id }] = rows(shop, "select max(act_id) as id from entries") as [{ id: number }];
    inTransaction(shop, (tx: Tx) => {
      const by = { doneBy: shop.people.lead, sentBy: shop.people.lead, device: null };
      reverseAct(tx, { now: daysAgo(3), ...by }, { actId: id, subject: `sorting:${newId()}` });
    });
    expect(colourOf("blue").weeks.reduce((sum, grams) => sum + grams, 0)).toBe(0);
  });
});
