import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { LabelCode } from "@/lib/core/bag-code";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { makeLabelIn } from "@/lib/bags/commands/labels";
import { inTransaction } from "@/lib/platform/database";
import { closeLot, closeOldLots } from "@/lib/stock/commands/close-lot";
import { setLotContainer } from "@/lib/stock/commands/container";
import { listLotsEndpoint } from "@/lib/stock/contract/lots";
import { getLotByLabel } from "@/lib/stock/queries/lot-label";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { getLot, listLots, LOTS_SQL } from "@/lib/stock/queries/lots";
import { LOT_STATES } from "@/lib/stock/terms";
import { auditRows, commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";

const WEEK = 7 * 86_400_000;

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

describe("closing a lot", () => {
  const close = (number: number) => ({
    requestId: newId(NOON),
    number,
    reason: "full" as const,
  });
  commandCases({
    command: closeLot,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => close(stockRoom(scheme).fill(100)),
    does: (_scheme, answer) =>
      expect(answer).toEqual({ number: 1, closedAt: NOON, closedFor: "full" }),
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const number = of.fill(100);
      closeLot(of.ctx("lead"), close(number));
      return { input: close(number), code: "lot-closed-already" };
    },
    action: "stock.close",
  });

  it("opens the next by itself, and is refused for a lot that is not there", () => {
    const number = room.fill(100);
    closeLot(room.ctx("volunteer"), close(number));
    expect(room.fill(50)).toBe(number + 1);
    expect(room.held(number)).toBe(100);
    expect(refusalOf(() => closeLot(room.ctx("volunteer"), close(99)))).toBe("not-found");
  });
});

describe("a lot's age", () => {
  const setWeeks = (weeks: number) =>
    room.db.writer.client
      .prepare("insert or replace into scheme_limits (id, lot_weeks) values (1, ?)")
      .run(weeks);

  it("closes by the nightly job, each lot with its audit row", () => {
    room.fill(100);
    room.fill(100, { colour: "white" }, 0, instant(NOON + WEEK));
    expect(closeOldLots(room.ctx("system", instant(NOON + 9 * WEEK)))).toBe(0);
    setWeeks(8);
    expect(closeOldLots(room.ctx("system", instant(NOON + 8 * WEEK - 1)))).toBe(0);
    const before = auditRows(room).length;
    expect(closeOldLots(room.ctx("system", instant(NOON + 8 * WEEK)))).toBe(1);
    expect(auditRows(room).slice(before)).toEqual([{ action: "stock.close", actor: null }]);
    expect(getLotRecord(room.db.reader, 1)).toMatchObject({
      closedAt: NOON + 8 * WEEK,
      closedFor: "age",
    });
    expect(getLotRecord(room.db.reader, 2)?.closedAt).toBeNull();
    expect(closeOldLots(room.ctx("system", instant(NOON + 8 * WEEK)))).toBe(0);
  });

  it("closes when the lot is asked for, before the night comes", () => {
    const number = room.fill(100);
    setWeeks(8);
    expect(room.fill(50, {}, 0, instant(NOON + 8 * WEEK))).toBe(number + 1);
    expect(getLotRecord(room.db.reader, number)?.closedFor).toBe("age");
  });

  it("is the program's own business, or a helper's", () => {
    expect(refusalOf(() => closeOldLots(room.ctx("donor")))).toBe("forbidden");
  });
});

describe("a lot's container", () => {
  const put = (number: number, containerId: Id<"container"> | null) => ({
    requestId: newId(NOON),
    number,
    containerId,
  });
  commandCases({
    command: setLotContainer,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => {
      const of = stockRoom(scheme);
      return put(of.fill(100), of.crateId);
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ number: 1, containerName: "Grey crate" });
      expect(getLot(scheme.ctx("volunteer"), 1)).toMatchObject({ containerName: "Grey crate" });
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      setLotContainer(of.ctx("lead"), put(of.fill(100), of.crateId));
      return { input: put(of.fill(100, { colour: "white" }), of.crateId), code: "container-taken" };
    },
    action: "stock.container",
  });

  it("can be another's once that lot is closed, or none; never one that is not listed", () => {
    const [a, b] = [room.fill(100), room.fill(100, { colour: "white" })];
    setLotContainer(room.ctx("volunteer"), put(a, room.crateId));
    closeLot(room.ctx("volunteer"), { requestId: newId(), number: a, reason: "full" });
    setLotContainer(room.ctx("volunteer"), put(b, room.crateId));
    expect(setLotContainer(room.ctx("volunteer"), put(b, null)).containerName).toBeNull();
    expect(
      refusalOf(() => setLotContainer(room.ctx("volunteer"), put(b, newId<"container">()))),
    ).toBe("unknown-container");
    expect(refusalOf(() => setLotContainer(room.ctx("volunteer"), put(99, null)))).toBe(
      "not-found",
    );
  });
});

describe("a scanned label", () => {
  it("opens the lot that it is on, or that lies in its container", () => {
    const number = room.fill(100);
    const lot = getLot(room.ctx("volunteer"), number);
    const by = (code: string) => getLotByLabel(room.ctx("volunteer"), { code: code as LabelCode });
    expect(by(lot?.labelCode ?? "")).toEqual({ number, containerId: null, heldGrams: 100 });
    const code = inTransaction(room, (tx) => makeLabelIn(tx, "container", room.crateId, NOON));
    expect(refusalOf(() => by(code))).toBe("unknown-code");
    setLotContainer(room.ctx("volunteer"), {
      requestId: newId(),
      number,
      containerId: room.crateId,
    });
    expect(by(code)).toEqual({ number, containerId: room.crateId, heldGrams: 100 });
    expect(refusalOf(() => by("K7Q29F4M"))).toBe("unknown-code");
  });
});

describe("the list of lots", () => {
  const list = (query: Record<string, string>) =>
    listLots(room.ctx("volunteer"), listLotsEndpoint.input.parse(query)).lots.map(
      ({ number }) => number,
    );

  it("is filtered by state, place, container and what it is", () => {
    const blue = room.fill(100);
    const white = room.fill(200, { colour: "white", polymer: "PP", kind: "tubs" });
    const flake = room.fill(300, { form: "flake", wash: "dry" });
    closeLot(room.ctx("lead"), { requestId: newId(), number: white, reason: "full" });
    room.db.writer.client
      .prepare("update lots set place = 'Rack B_1, 50%' where number = ?")
      .run(flake);
    setLotContainer(room.ctx("lead"), {
      requestId: newId(),
      number: blue,
      containerId: room.crateId,
    });
    room.db.writer.client
      .prepare(
        "insert into lots (id, number, holder_id, material_id, site_id, opened_at) select ?, 4, h.id, 3, 1, 0 from (select max(id) as id from holders) h",
      )
      .run(newId());
    expect(list({})).toEqual([blue, white, flake]);
    expect(list({ state: "open" })).toEqual([blue, flake, 4]);
    expect(list({ state: "closed" })).toEqual([white]);
    expect(list({ state: "empty" })).toEqual([4]);
    expect(list({ state: "all" })).toEqual([blue, white, flake, 4]);
    expect(list({ place: "rack b" })).toEqual([flake]);
    expect(list({ place: "50%" })).toEqual([flake]);
    expect(list({ place: "B%1" })).toEqual([]);
    expect(list({ place: "B_1" })).toEqual([flake]);
    expect(list({ place: "B11" })).toEqual([]);
    expect(list({ containerId: room.crateId })).toEqual([blue]);
    expect(list({ polymer: "PP", kind: "tubs", colourCode: "white" })).toEqual([white]);
    expect(list({ form: "flake", wash: "dry" })).toEqual([flake]);
    expect(list({ number: "4" })).toEqual([4]);
    expect(list({ number: String(white), polymer: "PP" })).toEqual([white]);
    expect(list({ number: "99" })).toEqual([]);
  });

  it("has thousands of lots in pages, each found by number", () => {
    const number = room.fill(100);
    const lot = getLotRecord(room.db.reader, number)!;
    inTransaction(room, (tx) => {
      const holder = tx.client.prepare("insert into holders (kind, code) values ('lot', ?)");
      const insert = tx.client.prepare(
        "insert into lots (id, number, holder_id, material_id, site_id, opened_at, closed_at) values (?, ?, ?, ?, 1, 0, 0)",
      );
      for (let next = number + 1; next <= 6000; next += 1) {
        const { lastInsertRowid } = holder.run(`L${next}`);
        insert.run(newId(), next, lastInsertRowid, lot.materialId);
      }
    });
    const seen: number[] = [];
    let after: number | undefined;
    const started = performance.now();
    do {
      const page = listLots(room.ctx("volunteer"), { state: "all", after });
      seen.push(...page.lots.map((one) => one.number));
      after = page.next ?? undefined;
    } while (after);
    expect(seen).toEqual(Array.from({ length: 6000 }, (_, at) => at + 1));
    // Sixty pages; a page that walked all lots would take each of them sixty times.
    expect(performance.now() - started).toBeLessThan(3000);
    const none = { polymer: null, colourCode: null, kind: null, form: null, wash: null };
    for (const state of LOT_STATES) {
      const plan = room.db.reader.client
        .prepare(`explain query plan ${LOTS_SQL[state]}`)
        .all({ ...none, place: null, containerId: null, after: 0, limit: 10 })
        .map((step) => (step as { detail: string }).detail)
        .join("\n");
      expect(plan).not.toMatch(/\b(lines|entries)\b/);
      expect(plan).toMatch(
        state === "held" ? /balances_held/ : state === "open" ? /lots_material/ : /number>\?/,
      );
    }
  });
});
