import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { sentence } from "@/lib/core/messages";
import { AppError } from "@/lib/core/errors";
import { countLot } from "@/lib/stock/commands/count-lot";
import { undoCount } from "@/lib/stock/commands/undo-count";
import type { CountLotInput } from "@/lib/stock/contract/counts";
import { listCountsToReview } from "@/lib/stock/queries/counts";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";
import { count, lastLines, rows } from "../../support/stock-work";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const parts = (of: StockRoom, number: number) =>
  rows(
    of,
    `select p.key as originNo, p.grams from parts p join lots l on l.holder_id = p.holder_id
      where l.number = ? and p.dim = 'O' order by p.key`,
    number,
  );

describe("counting a lot", () => {
  commandCases<CountLotInput, CountLotInput, unknown>({
    command: countLot,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => {
      const of = stockRoom(scheme);
      return count(of, of.fill(3160), 3120);
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({
        number: 1,
        kind: "count",
        bookGrams: 3160,
        countedGrams: 3120,
        differenceGrams: -40,
        closed: false,
      });
      expect(rows(scheme, "select sum(grams) as sum from lines group by entry_id")).toEqual([
        { sum: 0 },
        { sum: 0 },
        { sum: 0 },
      ]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      return { input: count(of, of.fill(100), 90, { number: 99 }), code: "not-found" };
    },
    action: "stock.count",
  });

  it("posts the difference under its own name, with the reading's basis and error", () => {
    const number = room.fill(3160);
    countLot(room.ctx("volunteer"), count(room, number, 3120));
    expect(lastLines(room)).toEqual([
      { account: "lot", grams: -40, basis: "unchecked", scale: 7, mpe: 3000 },
      { account: "difference", grams: 40, basis: null, scale: null, mpe: null },
    ]);
    expect(room.held(number)).toBe(3120);
  });

  it("takes a gain in the lot's own proportion, and as unknown when it was empty", () => {
    const number = room.fill(2000, {}, 0);
    room.fill(1000, {}, 1);
    countLot(room.ctx("volunteer"), count(room, number, 3300));
    expect(parts(room, number).map((part) => (part as { grams: number }).grams)).toEqual([
      2200, 1100,
    ]);
    countLot(room.ctx("volunteer"), count(room, number, "empty"));
    countLot(room.ctx("volunteer"), count(room, number, 250));
    expect(parts(room, number)).toEqual([{ originNo: 0, grams: 250 }]);
  });

  it("is kept without an entry when it agrees to the gram, and waits for nobody", () => {
    const number = room.fill(3120);
    const entries = rows(room, "select id from entries").length;
    const receipt = countLot(room.ctx("volunteer"), count(room, number, 3120));
    expect(receipt.differenceGrams).toBe(0);
    expect(rows(room, "select id from entries")).toHaveLength(entries);
    expect(rows(room, "select act_id, state from counts")).toEqual([
      { act_id: null, state: "posted" },
    ]);
    expect(listCountsToReview(room.ctx("lead"), {}).waiting).toBe(0);
  });

  it("adds several readings, each with its tare, and rounds once", () => {
    const number = room.fill(3160);
    const [first, second] = room.weighed(2150, 1120).readings;
    const receipt = countLot(
      room.ctx("volunteer"),
      count(room, number, 1, {
        counted: {
          found: "weighed",
          scaleId: room.scaleId,
          readings: [{ ...first!, containerId: room.crateId, containerTareMilligrams: 0 }, second!],
        },
      }),
    );
    // 2150 − 150 (the list's tare, not the client's 0) + 1120
    expect(receipt.countedGrams).toBe(3120);
  });

  it("“bin is empty” closes the lot with its remainder as difference, and the next opens by itself", () => {
    const number = room.fill(40);
    expect(countLot(room.ctx("volunteer"), count(room, number, "empty"))).toMatchObject({
      kind: "empty",
      countedGrams: 0,
      differenceGrams: -40,
      closed: true,
    });
    expect(getLotRecord(room.db.reader, number)).toMatchObject({
      closedAt: NOON,
      closedFor: "empty",
    });
    expect(room.held(number)).toBe(0);
    expect(room.fill(10)).toBe(number + 1);
  });

  it("of a bin that the book calls empty finds what is there, also in a closed lot", () => {
    const number = room.fill(40);
    countLot(room.ctx("volunteer"), count(room, number, "empty"));
    expect(countLot(room.ctx("volunteer"), count(room, number, 1500))).toMatchObject({
      bookGrams: 0,
      countedGrams: 1500,
    });
    expect(room.held(number)).toBe(1500);
  });

  it("says its own sentence for nothing left after the tare, a step that the scale has not, and more than it carries", () => {
    const number = room.fill(100);
    const with_ = (grossMilligrams: number, containerId: Id<"container"> | null = null) =>
      count(room, number, 1, {
        counted: {
          found: "weighed",
          scaleId: room.scaleId,
          readings: [
            {
              grossMilligrams,
              containerId,
              containerTareMilligrams: 0,
              sackId: null,
              sackTareMilligrams: 0,
            },
          ],
        },
      });
    const as = (input: CountLotInput) => refusalOf(() => countLot(room.ctx("volunteer"), input));
    expect(as(with_(150_000, room.crateId))).toBe("count-zero");
    expect(as(with_(100_500))).toBe("not-a-step");
    expect(as(with_(7_000_000))).toBe("above-max");
    expect(as(with_(100_000, room.crateId))).toBe("tare-above-gross");
    expect(as(with_(100_000, newId<"container">()))).toBe("unknown-container");
    expect(room.held(number)).toBe(100);
  });
});

describe("two counts at once", () => {
  it("tells what the other found and when, loses nothing, and goes through once confirmed", () => {
    const number = room.fill(3160);
    const second = count(room, number, 3050);
    countLot(room.ctx("lead", instant(NOON + 60_000)), count(room, number, 3120));
    let said = "";
    try {
      countLot(room.ctx("volunteer", instant(NOON + 120_000), second), second);
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      expect(error.code).toBe("lot-counted-meanwhile");
      said = sentence(error.code, error.detail);
    }
    expect(said).toContain("Test lead counted lot 1 meanwhile: 3.120 kg at 12:01.");
    expect(room.held(number)).toBe(3120);
    const again = { ...second, confirmed: true };
    expect(countLot(room.ctx("volunteer", instant(NOON + 120_000), again), again)).toMatchObject({
      bookGrams: 3120,
      countedGrams: 3050,
    });
  });

  it("tells of a count that moved nothing", () => {
    const number = room.fill(3160);
    const second = count(room, number, 3050);
    countLot(room.ctx("lead"), count(room, number, 3160));
    expect(refusalOf(() => countLot(room.ctx("volunteer"), second))).toBe("lot-counted-meanwhile");
  });

  it("tells of plastic that came meanwhile", () => {
    const number = room.fill(1000);
    const input = count(room, number, 990);
    room.fill(500);
    let error: unknown;
    try {
      countLot(room.ctx("volunteer"), input);
    } catch (caught) {
      error = caught;
    }
    expect(error).toBeInstanceOf(AppError);
    const { code, detail } = error as AppError;
    expect(sentence(code, detail)).toContain(
      "Lot 1 moved meanwhile: sorted into it by Test volunteer at 12:00, and the book holds 1.500 kg now.",
    );
  });
});

describe("undoing a count", () => {
  const posted = () => {
    const number = room.fill(3160);
    return countLot(room.ctx("volunteer"), count(room, number, 3120));
  };
  const undo = (id: Id<"count">) => ({ requestId: newId(NOON), id });

  commandCases({
    command: undoCount,
    by: "volunteer",
    notBy: "donor",
    input: (scheme) => {
      const of = stockRoom(scheme);
      const { countId } = countLot(of.ctx("volunteer"), count(of, of.fill(3160), 3120));
      return undo(countId);
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ number: 1, heldGrams: 3160 });
      expect(rows(scheme, "select state from counts")).toEqual([{ state: "undone" }]);
    },
    wrongState: (scheme) => {
      const of = stockRoom(scheme);
      const { countId } = countLot(of.ctx("volunteer"), count(of, of.fill(3160), 3120));
      undoCount(of.ctx("volunteer"), undo(countId));
      return { input: undo(countId), code: "undone-already" };
    },
    action: "stock.undo-count",
  });

  it("is for whoever saved it, for ten minutes", () => {
    const { countId } = posted();
    expect(refusalOf(() => undoCount(room.ctx("lead"), undo(countId)))).toBe("undo-not-yours");
    const late = room.ctx("volunteer", instant(NOON + 10 * 60_000 + 1));
    expect(refusalOf(() => undoCount(late, undo(countId)))).toBe("undo-too-late");
  });

  it("is withdrawn once something was taken of what it found", () => {
    const number = room.fill(100);
    const { countId } = countLot(room.ctx("volunteer"), count(room, number, 900));
    countLot(room.ctx("volunteer"), count(room, number, 300));
    expect(refusalOf(() => undoCount(room.ctx("volunteer"), undo(countId)))).toBe(
      "undo-used-since",
    );
  });

  it("opens a lot again that it closed, unless the next has opened", () => {
    const number = room.fill(40);
    const first = countLot(room.ctx("volunteer"), count(room, number, "empty"));
    undoCount(room.ctx("volunteer"), undo(first.countId));
    expect(getLotRecord(room.db.reader, number)).toMatchObject({ closedAt: null, closedFor: null });
    expect(room.held(number)).toBe(40);
    const second = countLot(room.ctx("volunteer"), count(room, number, "empty"));
    room.fill(10);
    undoCount(room.ctx("volunteer"), undo(second.countId));
    expect(getLotRecord(room.db.reader, number)?.closedFor).toBe("empty");
    expect(room.held(number)).toBe(40);
  });
});
