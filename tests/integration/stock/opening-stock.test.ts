import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { sentence } from "@/lib/core/messages";
import { countLot } from "@/lib/stock/commands/count-lot";
import { openStock } from "@/lib/stock/commands/open-stock";
import { correctCount } from "@/lib/stock/commands/review-count";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { count, lastLines, rows } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

describe("opening stock", () => {
  const opening = (of: StockRoom, more: object = {}) => ({
    requestId: newId(NOON),
    polymer: "PE-HD" as const,
    kind: "lids" as const,
    colourCode: "blue",
    form: "whole" as const,
    wash: "as-received" as const,
    place: "Rack B",
    sheet: "Sheet 3, signed W. Tidewell",
    occurredAt: NOON,
    ...of.weighed(4200),
    ...more,
  });
  const onFirstDay = (scheme: TestScheme) => {
    scheme.db.writer.client.prepare("update scheme set first_day = '2026-05-06'").run();
    return stockRoom(scheme);
  };

  commandCases({
    command: openStock,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => opening(onFirstDay(scheme)),
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ number: 1, kind: "opening", countedGrams: 4200 });
      expect(lastLines(scheme)).toEqual([
        { account: "opening", grams: -4200, basis: "unchecked", scale: 7, mpe: 3000 },
        { account: "lot", grams: 4200, basis: null, scale: null, mpe: null },
      ]);
      expect(
        rows(
          scheme,
          "select sum(opening) as opening, sum(collected) as collected from totals_month",
        ),
      ).toEqual([{ opening: 4200, collected: 0 }]);
      expect(rows(scheme, "select key from parts where dim = 'O'")).toEqual([{ key: 0 }]);
    },
    wrongState: (scheme) => ({ input: opening(stockRoom(scheme)), code: "opening-refused" }),
    action: "stock.opening",
  });

  it("is refused on every later day, with its sentence", () => {
    const of = onFirstDay(newScheme());
    const next = of.ctx("coordinator", instant(NOON + 86_400_000));
    expect(refusalOf(() => openStock(next, opening(of)))).toBe("opening-refused");
    expect(sentence("opening-refused")).toContain("only possible on the scheme's first day");
    of.close();
  });

  it("makes a lot of its own for each container, and can be corrected for good", () => {
    const of = onFirstDay(newScheme());
    openStock(of.ctx("coordinator"), opening(of));
    const { number, countId } = openStock(of.ctx("coordinator"), opening(of));
    expect(number).toBe(2);
    countLot(of.ctx("lead"), count(of, 2, 4000));
    const input = {
      requestId: newId(NOON),
      id: countId,
      reason: "Sheet 3 says 4.100 kg",
      replacement: { found: "weighed" as const, ...of.weighed(4100) },
    };
    const later = instant(NOON + 30 * 86_400_000);
    expect(correctCount(of.ctx("lead", later, input), input).heldGrams).toBe(3900);
    expect(rows(of, "select sum(opening) as opening from totals_month")).toEqual([
      { opening: 8300 },
    ]);
    of.close();
  });
});
