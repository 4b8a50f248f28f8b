import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { correctMove } from "@/lib/stock/commands/correct-move";
import { countLot } from "@/lib/stock/commands/count-lot";
import { identifyLot, mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import { undoMove } from "@/lib/stock/commands/undo-move";
import type { CorrectMoveInput, IdentifyLotInput, MergeLotInput } from "@/lib/stock/contract/moves";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { listLotMovements } from "@/lib/stock/queries/lot-movements";
import { listLotMoves, LOT_MOVES_SQL } from "@/lib/stock/queries/moves";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const rows = (of: TestScheme, sql: string, ...values: unknown[]) =>
  of.db.reader.client.prepare(sql).all(...values);
const partsOf = (of: StockRoom, number: number) =>
  rows(
    of,
    `select p.grams from parts p join lots l on l.holder_id = p.holder_id
      where l.number = ? and p.dim = 'O' order by p.key`,
    number,
  ).map((part) => (part as { grams: number }).grams);

/** Two lots of one material: the first is closed, so that the second opened. */
function twoLots(of: StockRoom): [number, number] {
  const first = of.fill(2000, {}, 0);
  of.db.writer.client
    .prepare("update lots set closed_at = ?, closed_for = 'full' where number = ?")
    .run(NOON, first);
  return [first, of.fill(1000, {}, 1)];
}

const merge = (
  number: number,
  toNumber: number,
  more: Partial<MergeLotInput> = {},
): MergeLotInput => ({
  requestId: newId(NOON),
  number,
  toNumber,
  amount: { how: "all" },
  count: null,
  occurredAt: NOON,
  ...more,
});
const taken = (of: StockRoom, grams: number, all = false) => ({
  how: "taken" as const,
  all,
  ...of.weighed(grams),
});

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

const identify = (number: number): IdentifyLotInput => ({
  requestId: newId(NOON),
  number,
  polymer: "PP",
  kind: "tubs",
  colourCode: "white",
  method: "float",
  amount: { how: "all" },
  count: null,
  occurredAt: NOON,
});

describe("identifying", () => {
  commandCases({
    command: identifyLot,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) =>
      identify(stockRoom(scheme).fill(400, { polymer: "not-sure", colour: "black", wash: "dry" })),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        kind: "identify",
        grams: 400,
        from: { heldGrams: 0, closed: true },
        to: { number: 2, heldGrams: 400, opened: true },
      });
      expect(getLotRecord(scheme.db.reader, 2)).toMatchObject({
        polymer: "PP",
        kind: "tubs",
        colourCode: "white",
        form: "whole",
        wash: "dry",
      });
      expect(rows(scheme, "select kind, method from lot_moves")).toEqual([
        { kind: "identify", method: "float" },
      ]);
      expect(rows(scheme, "select kind from entries order by id desc limit 1")).toEqual([
        { kind: "identify" },
      ]);
    },
    wrongState: (scheme) => ({
      input: identify(stockRoom(scheme).fill(400)),
      code: "lot-identified-already",
    }),
    action: "stock.identify",
  });

  it("may name a part, and joins the open lot of what it is", () => {
    const pp = room.fill(500, { polymer: "PP", kind: "tubs", colour: "white" });
    const number = room.fill(400, { polymer: "not-sure" });
    const input = { ...identify(number), amount: taken(room, 150) };
    expect(identifyLot(room.ctx("volunteer"), input)).toMatchObject({
      from: { heldGrams: 250, closed: false },
      to: { number: pp, heldGrams: 650, opened: false },
    });
    expect(
      refusalOf(() =>
        identifyLot(room.ctx("volunteer"), { ...identify(number), colourCode: "gold" }),
      ),
    ).toBe("unknown-colour");
  });
});

describe("taking a move back", () => {
  const undo = (id: Id<"lot-move">) => ({ requestId: newId(NOON), id });
  const merged = (of: StockRoom) => {
    const [first, second] = twoLots(of);
    return mergeLot(of.ctx("lead"), merge(second, first)).moveId;
  };
  commandCases({
    command: undoMove,
    by: "lead",
    notBy: "donor",
    input: (scheme) => undo(merged(stockRoom(scheme))),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        from: { number: 2, heldGrams: 1000 },
        to: { number: 1, heldGrams: 2000 },
      });
      expect(rows(scheme, "select closed_for from lots where number = 2")).toEqual([
        { closed_for: null },
      ]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const id = merged(of);
      undoMove(of.ctx("lead"), undo(id));
      return { input: undo(id), code: "undone-already" };
    },
    action: "stock.undo-move",
  });

  it("is for whoever saved it, in time, and not once it was used", () => {
    const id = merged(room);
    expect(refusalOf(() => undoMove(room.ctx("coordinator"), undo(id)))).toBe("undo-not-yours");
    const late = room.ctx("lead", instant(NOON + 10 * 60_000 + 1));
    expect(refusalOf(() => undoMove(late, undo(id)))).toBe("undo-too-late");
    countLot(room.ctx("volunteer"), {
      requestId: newId(NOON),
      number: 1,
      occurredAt: NOON,
      counted: { found: "weighed", ...room.weighed(2900) },
      seen: room.seen(1),
      confirmed: false,
    });
    expect(refusalOf(() => undoMove(room.ctx("lead"), undo(id)))).toBe("undo-used-since");
  });
});

describe("correcting a move", () => {
  const identified = (of: StockRoom) =>
    identifyLot(of.ctx("volunteer"), identify(of.fill(400, { polymer: "not-sure" }))).moveId;
  const correct = (
    id: Id<"lot-move">,
    replacement: CorrectMoveInput["replacement"],
  ): CorrectMoveInput => ({ requestId: newId(NOON), id, reason: "It sank after all", replacement });
  const asPs = {
    grams: 380,
    toNumber: null,
    identity: { polymer: "PS", kind: "tubs", colourCode: "white", method: "float" },
  } as const;

  commandCases({
    command: correctMove,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => correct(identified(stockRoom(scheme)), asPs),
    does: (scheme, answer, input) => {
      expect(answer).toMatchObject({
        replacementId: input.requestId,
        from: { number: 1, heldGrams: 20 },
        to: { number: 3, heldGrams: 380 },
        later: { count: 0 },
      });
      expect(
        rows(scheme, "select state, grams, corrects from lot_moves order by corrects"),
      ).toEqual([
        { state: "corrected", grams: 400, corrects: null },
        { state: "posted", grams: 380, corrects: input.id },
      ]);
      expect(
        rows(
          scheme,
          "select kind, note_hash is not null as noted from entries order by id desc limit 2",
        ),
      ).toEqual([
        { kind: "identify", noted: 1 },
        { kind: "reversal", noted: 1 },
      ]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const id = identified(of);
      correctMove(of.ctx("lead"), correct(id, asPs));
      return { input: correct(id, asPs), code: "corrected-already" };
    },
    action: "stock.correct-move",
  });

  it("goes through when the lot is empty meanwhile, names who took it, and settles", () => {
    const id = identified(room);
    const pp = 2;
    const other = room.fill(10, { polymer: "PP", kind: "tubs", colour: "white" });
    expect(other).toBe(pp);
    countLot(room.ctx("volunteer"), {
      requestId: newId(NOON),
      number: pp,
      occurredAt: NOON,
      counted: { found: "empty" },
      seen: room.seen(pp),
      confirmed: false,
    });
    const answer = correctMove(room.ctx("lead"), correct(id, asPs));
    expect(answer.later).toMatchObject({ count: 1, uses: [{ kind: "count", grams: 410 }] });
    expect(room.held(pp)).toBe(0);
    expect(rows(room, "select kind from entries order by id desc limit 1")).toEqual([
      { kind: "settling" },
    ]);
  });

  it("can send a merge to another lot, or only take it back", () => {
    const [first, second] = twoLots(room);
    const third = splitLot(room.ctx("lead"), {
      requestId: newId(NOON),
      number: first,
      amount: room.weighed(200),
      place: "",
      count: null,
      occurredAt: NOON,
    }).to.number;
    const { moveId } = mergeLot(room.ctx("lead"), merge(second, first));
    const answer = correctMove(room.ctx("coordinator"), {
      ...correct(moveId, { grams: 1000, toNumber: third, identity: null }),
    });
    expect(answer.to).toEqual({ number: third, heldGrams: 1200 });
    const again = correctMove(room.ctx("lead"), correct(answer.replacementId!, null));
    expect(again).toMatchObject({ replacementId: null, from: { number: second, heldGrams: 1000 } });
    expect(refusalOf(() => undoMove(room.ctx("lead"), { requestId: newId(), id: moveId }))).toBe(
      "corrected-already",
    );
  });

  it("is refused for a donor's eyes, a lot of another material, and a colour that is none", () => {
    const id = identified(room);
    const bad = { ...asPs, identity: { ...asPs.identity, colourCode: "gold" } };
    expect(refusalOf(() => correctMove(room.ctx("lead"), correct(id, bad)))).toBe("unknown-colour");
    const { moveId } = mergeLot(
      room.ctx("lead"),
      merge(...(twoLots(room).reverse() as [number, number])),
    );
    const white = room.fill(10, { colour: "white" });
    expect(
      refusalOf(() =>
        correctMove(
          room.ctx("lead"),
          correct(moveId, { grams: 10, toNumber: white, identity: null }),
        ),
      ),
    ).toBe("lots-differ");
  });
});

describe("a lot's history", () => {
  it("names what each entry was, with the other lot of a move", () => {
    const [first, second] = twoLots(room);
    mergeLot(room.ctx("lead"), merge(second, first));
    const { movements } = listLotMovements(room.ctx("volunteer"), { number: second });
    expect(
      movements.map(({ kind, record }) => [kind, record.kind, record.detail, record.otherNumber]),
    ).toEqual([
      ["move", "lot-move", "merge", first],
      ["sort", "sorting", null, null],
    ]);
    expect(listLotMoves(room.ctx("lead"), first)).toMatchObject([
      { kind: "merge", fromNumber: second, toNumber: first, undoUntil: NOON + 600_000 },
    ]);
    expect(listLotMoves(room.ctx("volunteer"), second)[0]?.undoUntil).toBeNull();
    const plan = rows(room, `explain query plan ${LOT_MOVES_SQL}`, { lotId: "x" })
      .map((step) => (step as { detail: string }).detail)
      .join("\n");
    expect(plan).toContain("lot_moves_from");
    expect(plan).toContain("lot_moves_to");
    expect(plan).not.toMatch(/SCAN (x|f|t|p)\b/);
  });
});
