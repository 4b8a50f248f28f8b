import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { day, instant, type Day } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { correctReceipt } from "@/lib/removals/commands/correct";
import { enterReceipt, undoReceipt } from "@/lib/removals/commands/receipts";
import { getRemoval } from "@/lib/removals/queries/removal-page";
import { listBalance } from "@/lib/reports/queries/balance";
import { imbalanceOf } from "@/lib/reports/rules/balance";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { outsideLines, removalDesk, type RemovalDesk } from "@/tests/support/removal-desk";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";
import { onPan } from "@/tests/support/shed";

const receiptIdOf = (scheme: TestScheme) =>
  scheme.db.reader.client
    .prepare("select id from removal_receipts where state = 'posted'")
    .pluck()
    .get() as Parameters<typeof undoReceipt>[1]["receiptId"];

describe("enterReceipt", () => {
  commandCases({
    command: enterReceipt,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const { id } = removalDesk(scheme).take({ grams: 2000 });
      return {
        requestId: newId(),
        id,
        number: "R 4711",
        day: day("2026-05-06"),
        receivedGrams: 1980,
      };
    },
    does: (scheme, answer, { id, requestId }) => {
      expect(answer).toEqual({
        receiptId: requestId,
        removalId: id,
        number: "R 4711",
        provenGrams: 2000,
      });
      expect(outsideLines(scheme)).toEqual([
        ["passed-on", "unproven", 2000],
        ["passed-on", "unproven", -2000],
        ["passed-on", "proven", 2000],
      ]);
      expect(getRemoval(scheme.ctx("lead"), id)?.receipts).toMatchObject([
        { number: "R 4711", receivedGrams: 1980, state: "posted", byName: "Test lead" },
      ]);
      expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
    },
    wrongState: (scheme) => {
      const { id } = removalDesk(scheme).take({ grams: 2000, route: "disposed" });
      const input = {
        requestId: newId(),
        id,
        number: "R 1",
        day: day("2026-05-06"),
        receivedGrams: 1,
      };
      return { input, code: "receipt-not-needed" };
    },
    action: "removals.receipt",
  });
});

describe("undoReceipt", () => {
  commandCases({
    command: undoReceipt,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const desk = removalDesk(scheme);
      const { id } = desk.take({ grams: 2000 });
      desk.prove(id, "R 1", "2026-05-06", NOON);
      return { requestId: newId(), id, receiptId: receiptIdOf(scheme) };
    },
    does: (scheme, answer, { id, receiptId }) => {
      expect(answer).toEqual({ receiptId, removalId: id });
      expect(getRemoval(scheme.ctx("lead"), id)?.receipts).toMatchObject([{ state: "undone" }]);
      expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
    },
    wrongState: (scheme) => {
      const { id } = removalDesk(scheme).take({ grams: 2000 });
      return {
        input: { requestId: newId(), id, receiptId: newId<"removal-receipt">() },
        code: "not-found",
      };
    },
    action: "removals.receipt-undo",
  });
});

describe("correctReceipt", () => {
  commandCases({
    command: correctReceipt,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => {
      const desk = removalDesk(scheme);
      const { id } = desk.take({ grams: 2000 });
      desk.prove(id, "R 1", "2026-05-06", NOON);
      return {
        requestId: newId(),
        id,
        receiptId: receiptIdOf(scheme),
        reason: "Read the number wrongly",
        replacement: { number: "R 7", day: day("2026-05-06"), receivedGrams: 2010 },
      };
    },
    does: (scheme, answer, { id, requestId, receiptId }) => {
      expect(answer).toEqual({ receiptId, replacementId: requestId });
      expect(getRemoval(scheme.ctx("lead"), id)?.receipts).toMatchObject([
        { id: requestId, number: "R 7", receivedGrams: 2010, state: "posted" },
        {
          number: "R 1",
          state: "corrected",
          correction: { reason: "Read the number wrongly", byName: "Test coordinator" },
        },
      ]);
      expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
    },
    wrongState: (scheme) => {
      const desk = removalDesk(scheme);
      const { id } = desk.take({ grams: 2000 });
      desk.prove(id, "R 1", "2026-05-06", NOON);
      const receiptId = receiptIdOf(scheme);
      const undo = { requestId: newId(), id, receiptId };
      undoReceipt(scheme.ctx("lead", NOON, undo), undo);
      return {
        input: { requestId: newId(), id, receiptId, reason: "Wrong", replacement: null },
        code: "undone-already",
      };
    },
    action: "removals.receipt-correct",
  });
});

let scheme: TestScheme;
let desk: RemovalDesk;
beforeEach(() => {
  scheme = newScheme();
  desk = removalDesk(scheme);
});
afterEach(() => scheme.close());

const JUNE_2 = instant(Date.UTC(2026, 5, 2, 9));

/** [month, passed unproven, passed proven, diverted, closing] of the whole scheme. */
const byMonth = () =>
  listBalance(
    scheme.db.reader,
    { from: day("2026-05-01"), until: day("2026-07-01") },
    ["month"],
    day("2026-06-30"),
  ).map(({ month, figures }) => {
    expect(imbalanceOf(figures)).toBe(0);
    return [month, figures.passedUnproven, figures.passedProven, figures.diverted, figures.closing];
  });

describe("a removal and its receipt in the totals", () => {
  it("is unproven in its own month, and proven from the receipt's day on", () => {
    const { id } = desk.take({ grams: 1500 });
    expect(byMonth()).toEqual([
      ["2026-05", 1500, 0, 0, 4500],
      ["2026-06", 0, 0, 0, 4500],
    ]);
    desk.prove(id, "R 12", "2026-06-02", JUNE_2);
    expect(byMonth()).toEqual([
      ["2026-05", 1500, 0, 0, 4500],
      ["2026-06", -1500, 1500, 1500, 4500],
    ]);
  });

  it("moves every part of a removal of several lots, in its own row, and counts its kilograms once", () => {
    const sent = desk.input({ grams: 2500, lot: 1 });
    if (sent.taking.how !== "weighed") throw new Error("weighed");
    const [first] = sent.taking.loads;
    if (!first) throw new Error("a load");
    sent.taking.loads.push({ ...first, lotNumber: 2, readings: [onPan(800)] });
    const { id } = desk.takeSent(sent);
    desk.prove(id, "R 13", "2026-06-02", JUNE_2, 3290);
    const rows = listBalance(
      scheme.db.reader,
      { from: day("2026-05-01"), until: day("2026-07-01") },
      ["polymer"],
      day("2026-06-30"),
    );
    for (const { figures } of rows) expect(imbalanceOf(figures)).toBe(0);
    expect(
      rows
        .filter(({ figures }) => figures.passedProven !== 0)
        .map(({ polymer, figures }) => [polymer, figures.passedProven, figures.passedUnproven]),
    ).toEqual([
      ["PE-HD", 2500, 0],
      ["PP", 800, 0],
    ]);
    expect(
      scheme.db.reader.client
        .prepare("select sum(grams) from totals_scale where measure = 'passed-on'")
        .pluck()
        .get(),
    ).toBe(3300);
    expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
  });
});

describe("refusals", () => {
  it("of a second receipt for the same removal, which names the first", () => {
    const { id } = desk.take({ grams: 500 });
    desk.prove(id, "R 1", "2026-05-06", NOON);
    try {
      desk.prove(id, "R 2", "2026-05-06", NOON);
      expect.unreachable();
    } catch (error) {
      expect(error).toMatchObject({
        code: "receipt-exists",
        detail: { number: "R 1", day: "6 May 2026" },
      });
    }
  });

  it("of the same receipt for another removal of the same receiver, however it is written", () => {
    const first = desk.take({ grams: 500 });
    const second = desk.take({ grams: 500 });
    desk.prove(first.id, "R 1", "2026-05-06", NOON);
    expect(() => desk.prove(second.id, "r 1", "2026-05-06", NOON)).toThrow("receipt-number-used");
    expect(desk.prove(second.id, "R 1/2", "2026-05-06", NOON)).toMatchObject({ number: "R 1/2" });
  });

  it("of a receipt older than the removal, or from the future, or for what was taken back", () => {
    const { id } = desk.take({ grams: 500 });
    expect(() => desk.prove(id, "R 1", "2026-05-05", NOON)).toThrow("receipt-too-early");
    expect(() => desk.prove(id, "R 1", "2026-05-07", NOON)).toThrow("future-time");
    expect(() => desk.prove(newId(), "R 1", "2026-05-06", NOON)).toThrow("not-found");
    desk.undo(id);
    expect(() => desk.prove(id, "R 1", "2026-05-06", NOON)).toThrow("removal-taken-back");
  });

  it("of undo by others and after ten minutes", () => {
    const { id } = desk.take({ grams: 500 });
    desk.prove(id, "R 1", "2026-05-06", NOON);
    const input = { requestId: newId(), id, receiptId: receiptIdOf(scheme) };
    expect(refusalOf(() => undoReceipt(scheme.ctx("coordinator"), input))).toBe("undo-not-yours");
    const late = scheme.ctx("lead", instant(NOON + 600_001));
    expect(refusalOf(() => undoReceipt(late, input))).toBe("undo-too-late");
  });

  it("of a correction onto a number in use, or a day before the removal; its own number stays good", () => {
    const first = desk.take({ grams: 500 });
    const second = desk.take({ grams: 500 });
    desk.prove(first.id, "R 1", "2026-05-06", NOON);
    desk.prove(second.id, "R 2", "2026-05-06", NOON);
    const receiptId = scheme.db.reader.client
      .prepare("select id from removal_receipts where removal_id = ?")
      .pluck()
      .get(second.id) as ReturnType<typeof receiptIdOf>;
    const correct = (number: string, on: Day) =>
      correctReceipt(scheme.ctx("lead"), {
        requestId: newId(),
        id: second.id,
        receiptId,
        reason: "Read it again",
        replacement: { number, day: on, receivedGrams: 500 },
      });
    expect(() => correct("R 1", day("2026-05-06"))).toThrow("receipt-number-used");
    expect(() => correct("R 2", day("2026-05-01"))).toThrow("receipt-too-early");
    expect(correct("R 2", day("2026-05-06"))).toMatchObject({ receiptId });
  });
});
