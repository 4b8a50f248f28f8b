import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { identifyLot } from "@/lib/stock/commands/move-lot";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { identify, rows, taken } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

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
