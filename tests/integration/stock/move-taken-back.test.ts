import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { correctMove } from "@/lib/stock/commands/correct-move";
import { countLot } from "@/lib/stock/commands/count-lot";
import { identifyLot, mergeLot, splitLot } from "@/lib/stock/commands/move-lot";
import { undoMove } from "@/lib/stock/commands/undo-move";
import type { CorrectMoveInput } from "@/lib/stock/contract/moves";
import { listLotMovements } from "@/lib/stock/queries/lot-movements";
import { listLotMoves, LOT_MOVES_SQL } from "@/lib/stock/queries/moves";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { identify, merge, rows, twoLots } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

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
