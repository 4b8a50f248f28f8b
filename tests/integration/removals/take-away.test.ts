import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { retireDestination } from "@/lib/removals/commands/destinations";
import { takeAway, undoRemoval } from "@/lib/removals/commands/take-away";
import { takeAwayEndpoint } from "@/lib/removals/contract/removals";
import { getRejectBin } from "@/lib/removals/queries/reject-bin";
import { getRemoval } from "@/lib/removals/queries/removal-page";
import { listRemovals } from "@/lib/removals/queries/removals";
import { getLotToTake } from "@/lib/removals/queries/lot-to-take";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { outsideLines, removalDesk, type RemovalDesk } from "@/tests/support/removal-desk";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";
import { onPan } from "@/tests/support/shed";

describe("takeAway", () => {
  commandCases({
    command: takeAway,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => removalDesk(scheme).input({ grams: 1500, route: "disposed" }),
    does: (scheme, answer, input) => {
      expect(answer).toMatchObject({
        id: input.requestId,
        source: "reject-bin",
        route: "disposed",
        grams: 1500,
        differenceGrams: 0,
        basis: "unchecked",
      });
      expect(outsideLines(scheme)).toEqual([["disposed", null, 1500]]);
      expect(getRejectBin(scheme.ctx("volunteer"))).toEqual({ heldGrams: 500, since: NOON });
      expect(getRemoval(scheme.ctx("volunteer"), answer.id)).toMatchObject({
        receiverName: "Marsh Transfer Station",
        receiverNumber: "REG/1042",
        carrierName: "Estuary Carriers",
        wasteCode: "19 12 04",
        noteNumber: "TN 118",
        grossMilligrams: 1_500_000,
        tareMilligrams: 0,
        byName: "Test lead",
        undoUntil: null,
      });
      expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
    },
    wrongState: (scheme) => {
      const desk = removalDesk(scheme);
      const retire = { requestId: newId(), destinationId: desk.recycler };
      retireDestination(scheme.ctx("coordinator", NOON, retire), retire);
      return { input: desk.input({ grams: 500 }), code: "unknown-destination" };
    },
    action: "removals.record",
  });
});

describe("undoRemoval", () => {
  commandCases({
    command: undoRemoval,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const { id } = removalDesk(scheme).take({ grams: 1500 });
      return { requestId: newId(), id };
    },
    does: (scheme, answer, { id }) => {
      expect(answer).toEqual({ id, state: "undone" });
      expect(getRejectBin(scheme.ctx("volunteer")).heldGrams).toBe(2000);
      expect(outsideLines(scheme)).toEqual([
        ["passed-on", "unproven", 1500],
        ["passed-on", "unproven", -1500],
      ]);
      expect(listRemovals(scheme.ctx("volunteer"), undefined)).toMatchObject({
        removals: [{ id, state: "undone" }],
        unproven: { count: 0, grams: 0 },
      });
    },
    wrongState: (scheme) => {
      const desk = removalDesk(scheme);
      const { id } = desk.take({ grams: 1500 });
      desk.prove(id, "R 1", "2026-05-06", NOON);
      return { input: { requestId: newId(), id }, code: "removal-has-receipt" };
    },
    action: "removals.undo",
  });
});

let scheme: TestScheme;
let desk: RemovalDesk;
beforeEach(() => {
  scheme = newScheme();
  desk = removalDesk(scheme);
});
afterEach(() => {
  expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
  scheme.close();
});

describe("a removal against the book", () => {
  it("posts a surplus within what the scale can tell as difference in the same entry", () => {
    expect(desk.take({ grams: 2005 })).toMatchObject({ grams: 2005, differenceGrams: -5 });
    expect(desk.held("bin")).toBe(0);
    expect(outsideLines(scheme)).toEqual([
      ["difference", null, -5],
      ["passed-on", "unproven", 2005],
    ]);
  });

  it("asks once beyond it, keeps nothing, and goes through when confirmed", () => {
    expect(() => desk.take({ grams: 2500 })).toThrow("removal-above-book");
    expect(desk.held("bin")).toBe(2000);
    expect(desk.take({ grams: 2500, confirmedAbove: true })).toMatchObject({
      grams: 2500,
      differenceGrams: -500,
    });
    expect(desk.held("bin")).toBe(0);
    expect(outsideLines(scheme)).toEqual([
      ["difference", null, -500],
      ["passed-on", "unproven", 2500],
    ]);
  });

  it("names the place, what the book has, what was weighed and how much more that is", () => {
    try {
      desk.take({ grams: 3500, lot: 1 });
      expect.unreachable();
    } catch (error) {
      expect(error).toMatchObject({
        code: "removal-above-book",
        path: ["confirmedAbove"],
        detail: { where: "lot 1", heldKg: "3.000", takenKg: "3.500", surplusKg: "0.500" },
      });
    }
  });

  it("takes from a bin that the book calls empty: it is found there first", () => {
    desk.take({ grams: 2000 });
    expect(desk.take({ grams: 300, confirmedAbove: true })).toMatchObject({
      differenceGrams: -300,
    });
    expect(desk.held("bin")).toBe(0);
    expect(
      scheme.db.reader.client.prepare("select kind from entries order by id desc limit 2").all(),
    ).toEqual([{ kind: "removal" }, { kind: "count" }]);
  });

  it("posts what is missing as difference when the bin is empty now", () => {
    expect(desk.take({ grams: 1900, whole: true, route: "disposed" })).toMatchObject({
      grams: 1900,
      differenceGrams: 100,
    });
    expect(desk.held("bin")).toBe(0);
    expect(outsideLines(scheme)).toEqual([
      ["disposed", null, 1900],
      ["difference", null, 100],
    ]);
  });

  it("takes what the book says, as estimated, and nothing where it says nothing", () => {
    expect(desk.take({ grams: 0, how: "book" })).toMatchObject({ grams: 2000, basis: "estimated" });
    expect(() => desk.take({ grams: 0, how: "book" })).toThrow("removal-nothing-there");
  });

  it("takes the carrier's word, which explains no surplus by itself", () => {
    expect(() => desk.take({ grams: 2001, how: "stated" })).toThrow("removal-above-book");
    expect(desk.take({ grams: 1800, how: "stated" })).toMatchObject({
      grams: 1800,
      basis: "stated",
    });
    expect(desk.held("bin")).toBe(200);
  });

  it("weighs a big load in several readings, rounded once", () => {
    const sent = desk.input({ grams: 1000 });
    if (sent.taking.how !== "weighed") throw new Error("weighed");
    const [load] = sent.taking.loads;
    load?.readings.push(onPan(500));
    expect(takeAway(scheme.ctx("lead", NOON, sent), sent).grams).toBe(1500);
  });
});

describe("a removal from lots", () => {
  const several = (lots: readonly [number: number, grams: number, whole: boolean][]) =>
    takeAwayEndpoint.input.parse({
      requestId: newId(NOON),
      destinationId: desk.recycler,
      day: "2026-05-06",
      noteNumber: "",
      taking: {
        how: "weighed",
        scaleId: desk.scale.id,
        loads: lots.map(([lotNumber, grams, whole]) => ({
          lotNumber,
          whole,
          readings: [onPan(grams)],
        })),
      },
    });

  it("takes from several, each in its own row, as one act", () => {
    const sent = several([
      [1, 2500, false],
      [2, 990, true],
    ]);
    const receipt = takeAway(scheme.ctx("lead", NOON, sent), sent);
    expect(receipt).toMatchObject({ source: "stock", grams: 3490, differenceGrams: 10 });
    expect(desk.held(1)).toBe(500);
    expect(desk.held(2)).toBe(0);
    expect(
      scheme.db.reader.client
        .prepare(
          `select r.polymer, l.account, l.grams from lines l join materials m on m.id = l.material_id
             join "rows" r on r.id = m.row_id
            where l.account in ('passed-on', 'difference') order by l.entry_id, l.seq`,
        )
        .all(),
    ).toEqual([
      { polymer: "PE-HD", account: "passed-on", grams: 2500 },
      { polymer: "PP", account: "passed-on", grams: 990 },
      { polymer: "PP", account: "difference", grams: 10 },
    ]);
    expect(getRemoval(scheme.ctx("lead"), receipt.id)?.lots).toEqual([
      { number: 1, name: "blue HDPE", grams: 2500 },
      { number: 2, name: "red PP", grams: 990 },
    ]);
  });

  it("refuses the same lot twice, an unknown lot, and bin and lots in one", () => {
    const twice = several([
      [1, 100, false],
      [1, 100, false],
    ]);
    expect(refusalOf(() => takeAway(scheme.ctx("lead"), twice))).toBe("removal-lot-twice");
    const unknown = several([[99, 100, false]]);
    expect(refusalOf(() => takeAway(scheme.ctx("lead"), unknown))).toBe("not-found");
    const both = takeAwayEndpoint.input.safeParse({
      ...several([[1, 100, false]]),
      taking: {
        how: "stated",
        loads: [
          { lotNumber: null, grams: 5 },
          { lotNumber: 1, grams: 5 },
        ],
      },
    });
    expect(both.error?.issues[0]?.message).toBe("mixed-sources");
  });

  it("says what a lot is and holds before anything is taken", () => {
    expect(getLotToTake(scheme.ctx("lead"), { number: 1 })).toEqual({
      number: 1,
      name: "blue HDPE",
      detail: "lids, whole, as received",
      heldGrams: 3000,
    });
    expect(refusalOf(() => getLotToTake(scheme.ctx("lead"), { number: 9 }))).toBe("not-found");
    expect(refusalOf(() => getLotToTake(scheme.ctx("volunteer"), { number: 1 }))).toBe("forbidden");
  });
});

describe("refusals", () => {
  it("of days that have not come, or are before the scheme", () => {
    expect(() => desk.take({ grams: 100, day: "2026-05-07" })).toThrow("future-time");
    expect(() => desk.take({ grams: 100, day: "2025-12-31" })).toThrow("too-long-ago");
  });

  it("of readings that the scale cannot have shown, at their field", () => {
    const sent = desk.input({ grams: 1 });
    expect(() => takeAway(scheme.ctx("lead"), sent)).toThrow("not-a-step");
    try {
      takeAway(scheme.ctx("lead"), sent);
    } catch (error) {
      expect(error).toMatchObject({
        path: ["taking", "loads", 0, "readings", 0, "grossMilligrams"],
      });
    }
    const scaleId = newId<"scale">();
    const other = { ...sent, taking: { ...sent.taking, scaleId } } as typeof sent;
    expect(() => takeAway(scheme.ctx("lead"), other)).toThrow("unknown-scale");
  });

  it("of undo by others, later than ten minutes, twice, and of what is not there", () => {
    const { id } = desk.take({ grams: 500 });
    const undo = (who: "lead" | "coordinator", now = NOON, removal: Id<"removal"> = id) =>
      undoRemoval(scheme.ctx(who, now), { requestId: newId(), id: removal });
    expect(() => undo("coordinator")).toThrow("undo-not-yours");
    expect(() => undo("lead", instant(NOON + 600_001))).toThrow("undo-too-late");
    expect(() => undo("lead", NOON, newId<"removal">())).toThrow("not-found");
    undo("lead");
    expect(() => undo("lead")).toThrow("undone-already");
  });
});
