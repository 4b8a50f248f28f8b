import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { sentence } from "@/lib/core/messages";
import { AppError } from "@/lib/core/errors";
import { countLot } from "@/lib/stock/commands/count-lot";
import { openStock } from "@/lib/stock/commands/open-stock";
import { acceptCount, correctCount } from "@/lib/stock/commands/review-count";
import { undoCount } from "@/lib/stock/commands/undo-count";
import type { CountLotInput } from "@/lib/stock/contract/counts";
import { listCountsToReview, listLotCounts, TO_REVIEW_SQL } from "@/lib/stock/queries/counts";
import { getLotRecord } from "@/lib/stock/queries/lot-record";
import { commandCases, refusalOf } from "../../support/command-cases";
import { newScheme, NOON, type TestScheme } from "../../support/scheme";
import { stockRoom, type StockRoom } from "../../support/stock-room";

let room: StockRoom;
beforeEach(() => {
  room = stockRoom(newScheme());
});
afterEach(() => room.close());

const count = (
  of: StockRoom,
  number: number,
  grams: number | "empty",
  more: Partial<CountLotInput> = {},
): CountLotInput => ({
  requestId: newId(NOON),
  number,
  occurredAt: NOON,
  counted: grams === "empty" ? { found: "empty" } : { found: "weighed", ...of.weighed(grams) },
  seen: of.seen(number),
  confirmed: false,
  ...more,
});
const rows = (of: TestScheme, sql: string, ...values: unknown[]) =>
  of.db.reader.client.prepare(sql).all(...values);
const lastLines = (of: TestScheme) =>
  rows(
    of,
    "select account, grams, basis, scale_id as scale, mpe_mg as mpe from lines where entry_id = (select max(id) from entries) order by seq",
  );
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

describe("a lead's review", () => {
  it("lists volunteers' counts, oldest first, and none of a lead's own", () => {
    const number = room.fill(3160);
    countLot(room.ctx("volunteer", instant(NOON + 1)), count(room, number, 3100));
    countLot(room.ctx("volunteer", instant(NOON + 2)), count(room, number, 3000));
    countLot(room.ctx("lead", instant(NOON + 3)), count(room, number, 2900));
    const list = listCountsToReview(room.ctx("lead"), {});
    expect(list.counts.map(({ countedGrams }) => countedGrams)).toEqual([3100, 3000]);
    expect(list).toMatchObject({ waiting: 2, next: null });
    expect(list.counts[0]).toMatchObject({
      material: "Blue HDPE, lids, whole, as received",
      byName: "Test volunteer",
      scaleName: "Fine scale",
      undoUntil: null,
    });
    expect(refusalOf(() => listCountsToReview(room.ctx("volunteer"), {}))).toBe("forbidden");
  });

  it("goes through pages without a gap, by its index", () => {
    const number = room.fill(3160);
    for (let at = 0; at < 120; at += 1) {
      countLot(room.ctx("volunteer", instant(NOON + (at >> 1))), count(room, number, 3000 - at));
    }
    const seen: number[] = [];
    let after: string | undefined;
    do {
      const page = listCountsToReview(room.ctx("lead"), { after });
      seen.push(...page.counts.map(({ countedGrams }) => countedGrams));
      after = page.next ?? undefined;
    } while (after);
    expect(new Set(seen).size).toBe(120);
    const plan = rows(room, `explain query plan ${TO_REVIEW_SQL}`, { at: 0, id: "" })
      .map((step) => (step as { detail: string }).detail)
      .join("\n");
    expect(plan).toContain("counts_to_review");
    expect(plan).not.toMatch(/SCAN/);
  });

  const accept = (id: Id<"count">) => ({ requestId: newId(NOON), id });
  const counted = (of: StockRoom) =>
    countLot(of.ctx("volunteer"), count(of, of.fill(3160), 3120)).countId;

  describe("accepting", () => {
    commandCases({
      command: acceptCount,
      by: "lead",
      notBy: "volunteer",
      input: (scheme) => accept(counted(stockRoom(scheme))),
      does: (scheme) => {
        expect(rows(scheme, "select reviewed_by, reviewed_at from counts")).toEqual([
          { reviewed_by: scheme.people.lead, reviewed_at: NOON },
        ]);
      },
      wrongState: (scheme) => {
        const id = counted(stockRoom(scheme));
        acceptCount(scheme.ctx("lead"), accept(id));
        return { input: accept(id), code: "not-for-review" };
      },
      action: "stock.accept-count",
    });
  });

  describe("correcting", () => {
    const correct = (of: StockRoom, id: Id<"count">, grams: number | "empty" | null) => ({
      requestId: newId(NOON),
      id,
      reason: "A crate stood on the scale",
      replacement:
        grams === null
          ? null
          : grams === "empty"
            ? { found: "empty" as const }
            : { found: "weighed" as const, ...of.weighed(grams) },
    });
    commandCases({
      command: correctCount,
      by: "lead",
      notBy: "volunteer",
      input: (scheme) => {
        const of = stockRoom(scheme);
        return correct(of, counted(of), 3150);
      },
      does: (scheme, answer, input) => {
        expect(answer).toMatchObject({ heldGrams: 3150, replacementId: input.requestId });
        expect(
          rows(scheme, "select state, counted_grams, corrects from counts order by corrects"),
        ).toEqual([
          { state: "corrected", counted_grams: 3120, corrects: null },
          { state: "posted", counted_grams: 3150, corrects: input.id },
        ]);
        expect(rows(scheme, "select subject_kind, reason from corrections")).toEqual([
          { subject_kind: "count", reason: "A crate stood on the scale" },
        ]);
      },
      wrongState: (scheme) => {
        const of = stockRoom(scheme);
        const id = counted(of);
        correctCount(of.ctx("lead"), correct(of, id, 3150));
        return { input: correct(of, id, 3140), code: "corrected-already" };
      },
      action: "stock.correct-count",
    });

    it("goes through after everything was taken, names the later uses, and settles what is missing", () => {
      const number = room.fill(100);
      const first = countLot(room.ctx("volunteer"), count(room, number, 900));
      const second = countLot(room.ctx("volunteer"), count(room, number, 50));
      const late = instant(NOON + 86_400_000);
      const input = correct(room, first.countId, null);
      const answer = correctCount(room.ctx("lead", late, input), input);
      expect(answer.later).toMatchObject({
        count: 1,
        uses: [{ kind: "count", subject: `count:${second.countId}`, grams: 850 }],
      });
      // 50 − 800 cannot be: the lot is short of 750, which is settled.
      expect(answer.heldGrams).toBe(0);
      const kinds = rows(room, "select kind from entries order by id desc limit 2");
      expect(kinds).toEqual([{ kind: "settling" }, { kind: "reversal" }]);
    });

    it("of a count that had agreed posts the difference alone", () => {
      const number = room.fill(3120);
      const { countId } = countLot(room.ctx("volunteer"), count(room, number, 3120));
      const input = correct(room, countId, 3100);
      expect(correctCount(room.ctx("lead", NOON, input), input).heldGrams).toBe(3100);
      expect(rows(room, "select state, undone_act_id from counts where id = ?", countId)).toEqual([
        { state: "corrected", undone_act_id: null },
      ]);
    });

    it("cannot be undone, only corrected once more", () => {
      const id = counted(room);
      const input = correct(room, id, 3150);
      const later = instant(NOON + 1);
      const { replacementId } = correctCount(room.ctx("lead", later, input), input);
      expect(
        refusalOf(() => undoCount(room.ctx("lead"), { requestId: newId(), id: replacementId! })),
      ).toBe("undo-of-correction");
      expect(listLotCounts(room.ctx("volunteer"), 1)).toMatchObject([
        { countedGrams: 3150, state: "posted", corrects: id },
        { countedGrams: 3120, state: "corrected", reason: "A crate stood on the scale" },
      ]);
    });
  });
});

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
