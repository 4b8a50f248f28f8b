import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { closeSorting } from "@/lib/sorting/commands/close";
import { setLotPlace } from "@/lib/stock/commands/place";
import { listLotMovements, MOVEMENTS_SQL } from "@/lib/stock/queries/lot-movements";
import {
  getLot,
  HELD_LOTS_SQL,
  listLots,
  LOT_BAGS_SQL,
  OPEN_LOTS_SQL,
} from "@/lib/stock/queries/lots";
import { CELLS_SQL, getStock, LOOSE_SQL } from "@/lib/stock/queries/stock";
import { layOutShelf } from "@/lib/stock/rules/shelf";
import { waitingSql } from "@/lib/sorting/queries/waiting";
import { newShed, noonOf, sorting, type Shed } from "../../support/shed";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => shed.close());

function sortTwoBags(): void {
  const a = shed.weigh(2160, { point: 0 });
  closeSorting(
    shed.ctx("volunteer"),
    sorting(shed, a, {
      piles: [{ grams: 1295 }, { colour: "white", grams: 755 }],
      rejects: [{ grams: 105 }],
    }),
  );
  const b = shed.weigh(1000, { point: 1 });
  closeSorting(
    shed.ctx("volunteer"),
    sorting(shed, b, {
      piles: [{ grams: 600 }, { polymer: "not-sure", colour: "black", grams: 400 }],
    }),
  );
  shed.weigh(700);
}

describe("stock", () => {
  it("shows what is held by polymer and colour, unsorted bags and the bin", () => {
    sortTwoBags();
    const stock = getStock(shed.ctx("volunteer"), {});
    const cells = stock.cells.map(({ polymer, colourCode, grams, reservedGrams, lots }) =>
      [polymer, colourCode, grams, reservedGrams, lots].join(" "),
    );
    expect(cells.sort()).toEqual([
      "PE-HD blue 1895 0 1",
      "PE-HD white 755 0 1",
      "not-sure black 400 0 1",
    ]);
    expect(stock).toMatchObject({
      unsorted: { bags: 1, grams: 700 },
      rejectGrams: 105,
      today: { bags: 3, grams: 3860 },
    });
    const shelf = layOutShelf(stock);
    expect(shelf.rows.map((row) => row.polymer)).toEqual([
      "PE-HD",
      "PP",
      "PE-LD",
      "PS",
      "not-sure",
    ]);
    expect([shelf.grams, shelf.reservedGrams, shelf.freeGrams]).toEqual([3050, 0, 3050]);
  });

  it("filters by kind, form and wash state", () => {
    sortTwoBags();
    const grams = (filter: Parameters<typeof getStock>[1]) =>
      getStock(shed.ctx("lead"), filter).cells.reduce((sum, cell) => sum + cell.grams, 0);
    expect(grams({ kind: "lids" })).toBe(3050);
    expect(grams({ kind: "film" })).toBe(0);
    expect(grams({ form: "whole", wash: "as-received" })).toBe(3050);
    expect(grams({ form: "flake" })).toBe(0);
    expect(grams({ wash: "dry" })).toBe(0);
  });

  it("is not for donors", () => {
    expect(() => getStock(shed.ctx("donor"), {})).toThrow("forbidden");
    expect(() => listLots(shed.ctx("donor"), { state: "held" })).toThrow("forbidden");
    expect(() => getLot(shed.ctx("donor"), 1)).toThrow("forbidden");
  });

  it("reads no ledger line or entry, so that a million of them cost nothing", () => {
    const plan = (sql: string, ...values: unknown[]): string =>
      (
        shed.db.reader.client.prepare(`explain query plan ${sql}`).all(...values) as {
          detail: string;
        }[]
      )
        .map((step) => step.detail)
        .join("\n");
    const filter = { kind: null, form: null, wash: null };
    const cells = plan(CELLS_SQL, filter);
    expect(cells).toContain("balances_held");
    expect(cells).not.toMatch(/SCAN (b|l|m|r)\b(?! USING COVERING INDEX balances_held)/);
    expect(plan(LOOSE_SQL, 1)).toContain("balances_held (material_id=?)");
    const lots = {
      ...filter,
      polymer: null,
      colourCode: null,
      place: null,
      containerId: null,
      after: 0,
      limit: 10,
    };
    expect(plan(HELD_LOTS_SQL, lots)).toContain("balances_held");
    expect(plan(OPEN_LOTS_SQL, lots)).toContain("lots_material");
    const movements = plan(MOVEMENTS_SQL, { holderId: 1, entryId: 1, seq: 1, limit: 1 });
    expect(movements).toContain("lines_holder (holder_id=? AND entry_id<?)");
    expect(movements).not.toMatch(/SCAN/);
    // The newest entries in the order of the index: a temporary tree would mean that all of them are read.
    const bags = plan(LOT_BAGS_SQL, { holderId: 1 });
    expect(bags).toContain("lines_holder (holder_id=?)");
    expect(bags).not.toMatch(/SCAN (?!f\b)|TEMP B-TREE FOR (GROUP|ORDER)/);
    const waiting = plan(waitingSql([]), { since: 0, id: "" });
    expect(waiting).toContain("bags_state_since (state=? AND state_since>?)");
    expect(waiting).not.toMatch(/SCAN/);
    for (const text of [cells, plan(HELD_LOTS_SQL, lots), plan(OPEN_LOTS_SQL, lots)]) {
      expect(text).not.toMatch(/\b(lines|entries|totals_)/);
    }
  });
});

describe("a lot", () => {
  it("knows its bags, where they came from, and every movement", () => {
    sortTwoBags();
    const lot = getLot(shed.ctx("volunteer"), 1);
    expect(lot).toMatchObject({ number: 1, polymer: "PE-HD", colourName: "Blue", heldGrams: 1895 });
    expect(lot?.origins.map(({ pointName, grams }) => [pointName, grams])).toEqual([
      ["Town library", 1295],
      ["Quay café", 600],
    ]);
    expect(lot?.heated).toEqual([{ times: 0, grams: 1895 }]);
    expect(lot?.bags.map((bag) => bag.grams).sort()).toEqual([1295, 600]);
    expect(lot?.moreBags).toBe(false);

    const { movements, next } = listLotMovements(shed.ctx("volunteer"), { number: 1 });
    expect(
      movements.map(({ kind, grams, afterGrams, doneBy }) => [kind, grams, afterGrams, doneBy]),
    ).toEqual([
      ["sort", 600, 1895, "Test volunteer"],
      ["sort", 1295, 1295, "Test volunteer"],
    ]);
    expect(movements.every((movement) => movement.bagCode !== null)).toBe(true);
    expect(next).toBeNull();
  });

  it("has its movements in pages without a gap or a double", () => {
    for (let at = 0; at < 120; at += 1) {
      const bag = shed.weigh(100, { at: noonOf("2026-05-05") });
      closeSorting(shed.ctx("volunteer"), sorting(shed, bag, { piles: [{ grams: 100 }] }));
    }
    const seen: number[] = [];
    let before: string | undefined;
    do {
      const page = listLotMovements(shed.ctx("volunteer"), { number: 1, before });
      seen.push(...page.movements.map((movement) => movement.entryId));
      before = page.next ?? undefined;
    } while (before);
    expect(seen).toHaveLength(120);
    expect(new Set(seen).size).toBe(120);
    expect([...seen].sort((a, b) => b - a)).toEqual(seen);

    // Of its bags the newest twelve are named.
    const lot = getLot(shed.ctx("volunteer"), 1);
    const newest = listLotMovements(shed.ctx("volunteer"), { number: 1 }).movements;
    expect(lot?.bags.map(({ code }) => code)).toEqual(
      newest.slice(0, 12).map(({ bagCode }) => bagCode),
    );
    expect(lot?.moreBags).toBe(true);
  });

  it("is null or not found when there is none of that number", () => {
    expect(getLot(shed.ctx("lead"), 9)).toBeNull();
    expect(() => listLotMovements(shed.ctx("lead"), { number: 9 })).toThrow("not-found");
  });
});

describe("setting a lot's place", () => {
  const input = (place: string) => ({ requestId: newId(), number: 1, place });

  it("keeps it, with one audit row and no entry", () => {
    sortTwoBags();
    const entries = count("entries");
    const audits = count("audit_events");
    expect(setLotPlace(shed.ctx("volunteer"), input("Rack B, shelf 2"))).toEqual({
      number: 1,
      place: "Rack B, shelf 2",
    });
    expect(getLot(shed.ctx("volunteer"), 1)?.place).toBe("Rack B, shelf 2");
    expect(count("audit_events")).toBe(audits + 1);
    expect(count("entries")).toBe(entries);
  });

  it("is refused for a donor and for a lot that is not there, and answers a repeated request once", () => {
    expect(() => setLotPlace(shed.ctx("donor"), input("x"))).toThrow("forbidden");
    expect(() => setLotPlace(shed.ctx("volunteer"), input("x"))).toThrow("not-found");
    sortTwoBags();
    const audits = count("audit_events");
    const place = input("Rack C");
    setLotPlace(shed.ctx("volunteer"), place);
    setLotPlace(shed.ctx("volunteer"), place);
    expect(count("audit_events")).toBe(audits + 1);
  });

  const count = (table: string): number =>
    shed.db.reader.client.prepare(`select count(*) from ${table}`).pluck().get() as number;
});
