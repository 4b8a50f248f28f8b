import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId, type Id } from "@/lib/core/ids";
import { day, instant, type Day } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { correctRemoval } from "@/lib/removals/commands/correct";
import { undoRemoval } from "@/lib/removals/commands/take-away";
import type { RemovalData } from "@/lib/removals/contract/removals";
import { getRemoval } from "@/lib/removals/queries/removal-page";
import { listBalance } from "@/lib/reports/queries/balance";
import { imbalanceOf } from "@/lib/reports/rules/balance";
import { commandCases } from "@/tests/support/command-cases";
import { removalDesk, type RemovalDesk } from "@/tests/support/removal-desk";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

/** The data of a removal without what only a new one has. */
function dataOf(desk: RemovalDesk, of: Parameters<RemovalDesk["input"]>[0]): RemovalData {
  const { destinationId, day: on, noteNumber, taking } = desk.input(of);
  return { destinationId, day: on, noteNumber, taking, confirmedAbove: false };
}

describe("correctRemoval", () => {
  commandCases({
    command: correctRemoval,
    by: "lead",
    notBy: "volunteer",
    input: (scheme) => {
      const desk = removalDesk(scheme);
      const { id } = desk.take({ grams: 1500 });
      return {
        requestId: newId(),
        id,
        reason: "Read 1.500 for 1.200",
        replacement: dataOf(desk, { grams: 1200, route: "disposed" }),
      };
    },
    does: (scheme, answer, { id, requestId }) => {
      expect(answer).toEqual({ id, replacementId: requestId, grams: 1200, receipt: "none" });
      expect(getRemoval(scheme.ctx("volunteer"), id)).toMatchObject({
        state: "corrected",
        correction: { reason: "Read 1.500 for 1.200", replacementId: requestId },
      });
      expect(getRemoval(scheme.ctx("volunteer"), requestId)).toMatchObject({
        state: "posted",
        corrects: id,
        grams: 1200,
        route: "disposed",
        undoUntil: null,
      });
      expect(verifyLedger(scheme.db.reader)).toMatchObject({ ok: true });
    },
    wrongState: (scheme) => {
      const { id } = removalDesk(scheme).take({ grams: 1500 });
      const undo = { requestId: newId(), id };
      undoRemoval(scheme.ctx("lead", NOON, undo), undo);
      return {
        input: { requestId: newId(), id, reason: "Wrong", replacement: null },
        code: "undone-already",
      };
    },
    action: "removals.correct",
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
  const rows = listBalance(
    scheme.db.reader,
    { from: day("2026-05-01"), until: day("2026-07-01") },
    ["month", "polymer", "point"],
    day("2026-06-30"),
  );
  for (const { figures } of rows) expect(imbalanceOf(figures)).toBe(0);
  scheme.close();
});

const JUNE_2 = instant(Date.UTC(2026, 5, 2, 9));

const correct = (id: Id<"removal">, of: Parameters<RemovalDesk["input"]>[0] | null) =>
  correctRemoval(scheme.ctx("coordinator", JUNE_2), {
    requestId: newId(JUNE_2),
    id,
    reason: "Weighed anew",
    replacement: of && dataOf(desk, of),
  });

const total = () => {
  const [row] = listBalance(
    scheme.db.reader,
    { from: day("2026-05-01"), until: day("2026-07-01") },
    [],
    day("2026-06-30"),
  );
  if (!row) throw new Error("no row");
  const { disposed, passedProven, passedUnproven, difference, closing } = row.figures;
  return { disposed, passedProven, passedUnproven, difference, closing };
};

describe("a correction always goes through", () => {
  it("to less: the rest is in the bin again", () => {
    const { id } = desk.take({ grams: 2000 });
    correct(id, { grams: 1600 });
    expect(desk.held("bin")).toBe(400);
    expect(total()).toMatchObject({ passedUnproven: 1600, difference: 0, closing: 4400 });
  });

  it("to more, after the bin was emptied: what the book lacks is difference, and nothing is asked", () => {
    const { id } = desk.take({ grams: 1500 });
    desk.take({ grams: 500, route: "disposed" });
    expect(desk.held("bin")).toBe(0);
    correct(id, { grams: 1800 });
    expect(desk.held("bin")).toBe(0);
    expect(total()).toEqual({
      disposed: 500,
      passedProven: 0,
      passedUnproven: 1800,
      difference: -300,
      closing: 4000,
    });
  });

  it("to 'emptied whole' as it was then: what came into the bin since stays", () => {
    const { id } = desk.take({ grams: 1900 });
    desk.fill(0, 0, 700);
    correct(id, { grams: 1900, whole: true });
    expect(desk.held("bin")).toBe(700);
    expect(total()).toMatchObject({ passedUnproven: 1900, difference: 100 });
  });

  it("from the bin to a lot, and back to nothing", () => {
    const { id } = desk.take({ grams: 500 });
    const { replacementId } = correct(id, { grams: 500, lot: 2 });
    expect(desk.held("bin")).toBe(2000);
    expect(desk.held(2)).toBe(500);
    correct(replacementId as Id<"removal">, null);
    expect(desk.held(2)).toBe(1000);
    expect(total()).toEqual({
      disposed: 0,
      passedProven: 0,
      passedUnproven: 0,
      difference: 0,
      closing: 6000,
    });
  });

  it("keeps a destination that has left the list, and a scale of its time", () => {
    const { id } = desk.take({ grams: 500 });
    desk.retire(desk.recycler);
    expect(correct(id, { grams: 400 })).toMatchObject({ grams: 400 });
    expect(() => desk.take({ grams: 5 })).toThrow("unknown-destination");
  });
});

describe("a correction of what a receipt has proven", () => {
  it("takes the receipt back and enters it again for what stands now", () => {
    const { id } = desk.take({ grams: 1500 });
    desk.prove(id, "R 9", "2026-05-06", NOON, 1480);
    const { replacementId, receipt } = correct(id, { grams: 1400 });
    expect(receipt).toBe("kept");
    expect(total()).toMatchObject({ passedProven: 1400, passedUnproven: 0 });
    expect(getRemoval(scheme.ctx("lead"), id)?.receipts).toMatchObject([{ state: "corrected" }]);
    expect(getRemoval(scheme.ctx("lead"), replacementId ?? "")?.receipts).toMatchObject([
      { number: "R 9", receivedGrams: 1480, state: "posted" },
    ]);
  });

  it("is not left with a receipt when it went to disposal, or never went", () => {
    const first = desk.take({ grams: 500 });
    const second = desk.take({ grams: 500 });
    desk.prove(first.id, "R 1", "2026-05-06", NOON);
    desk.prove(second.id, "R 2", "2026-05-06", NOON);
    expect(correct(first.id, { grams: 500, route: "disposed" }).receipt).toBe("taken-back");
    expect(correct(second.id, null).receipt).toBe("taken-back");
    expect(total()).toMatchObject({ disposed: 500, passedProven: 0, passedUnproven: 0 });
  });

  it("does not prove before it left", () => {
    const { id } = desk.take({ grams: 500, day: "2026-05-04" });
    desk.prove(id, "R 1", "2026-05-05", NOON);
    correctRemoval(scheme.ctx("lead", JUNE_2), {
      requestId: newId(JUNE_2),
      id,
      reason: "It left in June",
      replacement: { ...dataOf(desk, { grams: 500 }), day: "2026-06-01" as Day },
    });
    expect(
      scheme.db.reader.client
        .prepare(
          "select day, passed_proven, passed_unproven from totals_day where day >= '2026-06-01'",
        )
        .raw()
        .all(),
    ).toEqual([["2026-06-01", 500, 0]]);
  });
});

describe("refusals", () => {
  it("of what was corrected already, and of undoing what stands in its place", () => {
    const { id } = desk.take({ grams: 500 });
    const { replacementId } = correct(id, { grams: 400 });
    expect(() => correct(id, null)).toThrow("corrected-already");
    const undo = { requestId: newId(), id: replacementId as Id<"removal"> };
    expect(() => undoRemoval(scheme.ctx("coordinator", JUNE_2), undo)).toThrow(
      "undo-of-correction",
    );
    expect(() => correct(newId(), null)).toThrow("not-found");
  });
});
