import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { identifyLot, mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import type { MergeLotInput } from "@/lib/stock/contract/moves";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { identify, merge, rows, taken, twoLots } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const partsOf = (of: StockRoom, number: number) =>
  rows(
    of,
    `select p.grams from parts p join lots l on l.holder_id = p.holder_id
      where l.number = ? and p.dim = 'O' order by p.key`,
    number,
  ).map((part) => (part as { grams: number }).grams);

describe("merging", () => {
  commandCases({
    command: mergeLot,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const [first, second] = twoLots(stockRoom(scheme));
      return merge(second, first);
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        kind: "merge",
        grams: 1000,
        differenceGrams: 0,
        from: { number: 2, heldGrams: 0, closed: true },
        to: { number: 1, heldGrams: 3000, opened: false },
      });
      expect(rows(scheme, "select closed_for from lots order by number")).toEqual([
        { closed_for: "full" },
        { closed_for: "merged" },
      ]);
      expect(rows(scheme, "select kind from entries order by id desc limit 1")).toEqual([
        { kind: "move" },
      ]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      return {
        input: merge(of.fill(100), of.fill(100, { colour: "white" })),
        code: "lots-differ",
      };
    },
    action: "stock.merge",
  });

  it("brings origins along, to the gram", () => {
    const [first, second] = twoLots(room);
    mergeLot(room.ctx("lead"), merge(first, second, { amount: taken(room, 500) }));
    expect(partsOf(room, second)).toEqual([500, 1000]);
    expect(partsOf(room, first)).toEqual([1500]);
    expect(getLotRecord(room.db.reader, second)?.closedAt).toBeNull();
  });

  it("refuses the lot itself, one that is not there, and an empty one", () => {
    const [first, second] = twoLots(room);
    const as = (input: MergeLotInput) => refusalOf(() => mergeLot(room.ctx("lead"), input));
    expect(as(merge(first, first))).toBe("same-lot");
    expect(as(merge(first, 99))).toBe("unknown-lot");
    expect(as(merge(99, first))).toBe("not-found");
    mergeLot(room.ctx("lead"), merge(second, first));
    expect(as(merge(second, first))).toBe("lot-empty");
  });

  it("within tolerance posts what was found more or less as difference in the same entry", () => {
    const [first, second] = twoLots(room);
    const more = mergeLot(room.ctx("lead"), merge(second, first, { amount: taken(room, 1002) }));
    expect(more).toMatchObject({ grams: 1002, differenceGrams: -2, from: { heldGrams: 0 } });
    expect(room.held(first)).toBe(3002);
    const whole = mergeLot(
      room.ctx("lead"),
      merge(first, second, { amount: taken(room, 2999, true) }),
    );
    expect(whole).toMatchObject({ grams: 2999, differenceGrams: 3, from: { heldGrams: 0 } });
    expect(rows(room, "select count(*) as n from counts")).toEqual([{ n: 0 }]);
  });
});

describe("taking more than the book holds", () => {
  it("asks for one count on the spot, and with it goes through", () => {
    const [first, second] = twoLots(room);
    const input = merge(second, first, { amount: taken(room, 1500) });
    expect(refusalOf(() => mergeLot(room.ctx("lead"), input))).toBe("lot-holds-less");
    expect(room.held(second)).toBe(1000);
    const again = { ...input, count: { found: "weighed" as const, ...room.weighed(300) } };
    const answer = mergeLot(room.ctx("lead", NOON, again), again);
    expect(answer).toMatchObject({ grams: 1500, differenceGrams: 0, from: { heldGrams: 300 } });
    expect(rows(room, "select kind, book_grams, counted_grams, reviewed_by from counts")).toEqual([
      {
        kind: "on-the-spot",
        book_grams: 1000,
        counted_grams: 1800,
        reviewed_by: room.people.lead,
      },
    ]);
    expect(room.held(first)).toBe(3500);
  });

  it("takes “the bin is empty” for an answer", () => {
    const [first, second] = twoLots(room);
    const input = merge(second, first, {
      amount: taken(room, 1500),
      count: { found: "empty" },
    });
    expect(mergeLot(room.ctx("lead"), input)).toMatchObject({ from: { heldGrams: 0 } });
  });

  it("asks nobody when all of it was weighed: that is the count, which a lead reviews", () => {
    const number = room.fill(1000, { polymer: "not-sure" });
    const answer = identifyLot(room.ctx("volunteer"), {
      ...identify(number),
      amount: taken(room, 700, true),
    });
    expect(answer).toMatchObject({ grams: 700, differenceGrams: 0, from: { heldGrams: 0 } });
    expect(rows(room, "select kind, counted_grams, reviewed_at from counts")).toEqual([
      { kind: "on-the-spot", counted_grams: 700, reviewed_at: null },
    ]);
  });
});

describe("splitting", () => {
  const split = (of: StockRoom, number: number, grams: number) => ({
    requestId: newId(NOON),
    number,
    amount: of.weighed(grams),
    place: "Rack C",
    count: null,
    occurredAt: NOON,
  });
  commandCases({
    command: splitLot,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const of = stockRoom(scheme);
      return split(of, of.fill(2000), 600);
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        kind: "split",
        grams: 600,
        from: { number: 1, heldGrams: 1400, closed: false },
        to: { number: 2, heldGrams: 600, opened: true },
      });
      expect(rows(scheme, "select place from lots where number = 2")).toEqual([
        { place: "Rack C" },
      ]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      return { input: split(of, of.fill(100), 600), code: "lot-holds-less" };
    },
    action: "stock.split",
  });

  it("leaves the lot that piles go to, and no lot behind when it is refused", () => {
    const number = room.fill(2000);
    splitLot(room.ctx("lead"), split(room, number, 600));
    expect(room.fill(100)).toBe(number);
    expect(refusalOf(() => splitLot(room.ctx("lead"), split(room, number, 5000)))).toBe(
      "lot-holds-less",
    );
    expect(rows(room, "select number from lots")).toHaveLength(2);
  });
});
