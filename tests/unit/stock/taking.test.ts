import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { doneAt, judgeSeen } from "@/lib/stock/rules/counting";
import { oldestOpening } from "@/lib/stock/rules/lot-ends";
import { judgeTaking } from "@/lib/stock/rules/taking";

const take = (bookGrams: number, wantedGrams: number, toleranceGrams: number, all = false) =>
  judgeTaking({ bookGrams, wantedGrams, toleranceMilligrams: toleranceGrams * 1000, all });

describe("taking out of a lot", () => {
  it("takes what the book has", () => {
    expect(take(1000, 400, 5)).toEqual({ kind: "fine", takenGrams: 400, differenceGrams: 0 });
    expect(take(1000, 1000, 0)).toEqual({ kind: "fine", takenGrams: 1000, differenceGrams: 0 });
  });

  it("posts a surplus within tolerance as a gain, to the gram", () => {
    expect(take(1000, 1005, 5)).toEqual({ kind: "fine", takenGrams: 1000, differenceGrams: -5 });
    expect(take(1000, 1006, 5)).toEqual({ kind: "holds-less" });
  });

  it("takes all of the book when all was weighed, both ways", () => {
    expect(take(1000, 996, 5, true)).toEqual({
      kind: "fine",
      takenGrams: 1000,
      differenceGrams: 4,
    });
    expect(take(1000, 1004, 5, true)).toEqual({
      kind: "fine",
      takenGrams: 1000,
      differenceGrams: -4,
    });
    expect(take(1000, 900, 5, true)).toEqual({ kind: "is-a-count" });
    expect(take(1000, 1100, 5, true)).toEqual({ kind: "is-a-count" });
  });

  it("asks what is in a lot that the book calls empty, however little is taken", () => {
    expect(take(0, 1, 5)).toEqual({ kind: "holds-less" });
    expect(take(0, 1, 5, true)).toEqual({ kind: "is-a-count" });
  });

  it("never takes more than the book holds, and closes with what was weighed", () => {
    fc.assert(
      fc.property(
        fc.nat(5000),
        fc.integer({ min: 1, max: 5000 }),
        fc.nat(50),
        fc.boolean(),
        (book, wanted, tolerance, all) => {
          const verdict = take(book, wanted, tolerance, all);
          if (verdict.kind !== "fine") return;
          expect(verdict.takenGrams).toBeLessThanOrEqual(book);
          expect(verdict.takenGrams - verdict.differenceGrams).toBe(wanted);
          expect(Math.abs(verdict.differenceGrams)).toBeLessThanOrEqual(tolerance);
        },
      ),
    );
  });
});

describe("counting", () => {
  it("tells a count before a movement, and nothing when nothing happened", () => {
    const seen = { entryId: 7, countId: "a" };
    expect(judgeSeen(seen, { entryId: 7, countId: "a" })).toBe("same");
    expect(judgeSeen(seen, { entryId: 8, countId: "a" })).toBe("moved");
    expect(judgeSeen(seen, { entryId: 8, countId: "b" })).toBe("counted");
    // A count that agreed with the book moved nothing, and is told all the same.
    expect(judgeSeen(seen, { entryId: 7, countId: "b" })).toBe("counted");
  });

  it("happens between the lot's opening and now, whatever the phone says", () => {
    const [opened, now] = [instant(1000), instant(2000)];
    expect(doneAt(instant(1500), opened, now)).toBe(1500);
    expect(doneAt(instant(10), opened, now)).toBe(1000);
    expect(doneAt(instant(9999), opened, now)).toBe(2000);
  });
});

describe("a lot's age", () => {
  it("closes nothing without a setting, and else what was opened so many weeks ago or before", () => {
    const now = instant(Date.UTC(2026, 4, 29, 12));
    expect(oldestOpening(null, now)).toBeNull();
    expect(oldestOpening(4, now)).toBe(Date.UTC(2026, 4, 1, 12));
  });
});
