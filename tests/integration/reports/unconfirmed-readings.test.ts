import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { addDays, day, type Instant } from "@/lib/core/time";
import { listUnconfirmed } from "@/lib/reports/queries/unconfirmed-readings";
import { addCheckWeight } from "@/lib/scales/commands/check-weights";
import { checkScale, clearScale } from "@/lib/scales/commands/checks";
import { closeSorting } from "@/lib/sorting/commands/close";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { refusalOf } from "@/tests/support/command-cases";
import { NOON } from "@/tests/support/scheme";
import { newShed, noonOf, sorting, type Shed } from "@/tests/support/shed";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => shed.close());

const seen = () => listUnconfirmed(shed.ctx("lead"), shed.scaleId);

function sort(of: { grams: number; rejects: number }, at: Instant = NOON) {
  const bag = shed.weigh(of.grams + of.rejects, { at });
  const input = sorting(shed, bag, {
    at,
    piles: [{ grams: of.grams }],
    rejects: [{ grams: of.rejects }],
  });
  return { bag, receipt: closeSorting(shed.ctx("volunteer", at), input) };
}

describe("readings on a scale that was not confirmed", () => {
  it("are listed by day, newest first, with the bag that they belong to", () => {
    const { bag } = sort({ grams: 900, rejects: 100 });
    const older = shed.weigh(500, { at: noonOf("2026-05-04") });
    expect(seen().days.map(({ day: on, grams }) => [on, grams])).toEqual([
      ["2026-05-06", 2000],
      ["2026-05-04", 500],
    ]);
    expect(seen().days[0]?.records).toMatchObject([
      { kind: "sort", grams: 1000, code: bag.code },
      { kind: "weigh-in", grams: 1000, code: bag.code },
    ]);
    expect(seen().days[1]?.records).toMatchObject([{ kind: "weigh-in", code: older.code }]);
  });

  it("leave the list when they were taken back, when a lead clears the day, and after a month", () => {
    shed.weigh(700, { at: noonOf(addDays(day("2026-05-06"), -40)) });
    const { receipt } = sort({ grams: 900, rejects: 100 });
    undoSorting(shed.ctx("volunteer"), { requestId: newId(), id: receipt.sortingId });
    expect(seen().days.flatMap(({ records }) => records.map(({ kind }) => kind))).toEqual([
      "weigh-in",
    ]);
    clearScale(shed.ctx("lead"), {
      requestId: newId(),
      scaleId: shed.scaleId,
      day: day("2026-05-06"),
      note: "Weighed a crate on both scales",
    });
    expect(seen()).toEqual({ days: [], more: false });
  });

  it("are none once the scale was checked first", () => {
    const { id } = addCheckWeight(shed.ctx("coordinator"), {
      requestId: newId(),
      name: "Brass",
      massMilligrams: 2_000_000,
      evidence: "Certificate 118",
    });
    const bag = shed.weigh(1000);
    checkScale(shed.ctx("volunteer"), {
      requestId: newId(),
      scaleId: shed.scaleId,
      checkWeightId: id,
      readingMilligrams: 2_000_000,
    });
    closeSorting(shed.ctx("volunteer"), sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    // The weigh-in came before the check and keeps its basis.
    expect(seen().days[0]?.records.map(({ kind }) => kind)).toEqual(["weigh-in"]);
  });

  it("are for leads", () => {
    expect(refusalOf(() => listUnconfirmed(shed.ctx("volunteer"), shed.scaleId))).toBe("forbidden");
  });
});
