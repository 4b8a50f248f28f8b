import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays, day } from "@/lib/core/time";
import { entriesOf, isFarAbove, movementOf, permitState, refuseDay } from "@/lib/removals/rules";

const load = fc.record({
  heldGrams: fc.nat(50_000),
  takenGrams: fc.integer({ min: 1, max: 60_000 }),
  whole: fc.boolean(),
});

describe("what a removal moves", () => {
  it("never takes more than the book has from the book, and names every gram of the rest", () => {
    fc.assert(
      fc.property(load, (one) => {
        const { leavesGrams, surplusGrams, remainderGrams } = movementOf(one);
        expect(leavesGrams).toBeLessThanOrEqual(one.heldGrams);
        expect(leavesGrams + surplusGrams).toBe(one.takenGrams + remainderGrams);
        if (one.whole) expect(leavesGrams).toBe(one.heldGrams);
        expect(Math.min(surplusGrams, remainderGrams)).toBe(0);
      }),
    );
  });

  it("makes entries that sum to zero and leave the place as it should be", () => {
    const place = { account: "reject-bin", holderId: 7, materialId: 2 } as const;
    const known = { basis: "checked", scaleNumber: 1, mpeMilligrams: 5_000 } as const;
    fc.assert(
      fc.property(load, fc.constantFrom("disposed", "passed-on"), (one, route) => {
        const entries = entriesOf(place, one, route, known);
        const lines = entries.flatMap((entry) => entry.lines);
        for (const entry of entries) {
          expect(entry.lines.reduce((sum, line) => sum + line.grams, 0)).toBe(0);
          expect(entry.lines.every((line) => line.grams !== 0)).toBe(true);
        }
        const left = lines.reduce(
          (sum, line) => sum + ("holderId" in line ? line.grams : 0),
          one.heldGrams,
        );
        expect(left).toBe(one.whole ? 0 : Math.max(0, one.heldGrams - one.takenGrams));
        // The reading stands once, on what left.
        expect(lines.filter(({ basis }) => basis)).toMatchObject([
          { account: route, grams: one.takenGrams, basis: "checked" },
        ]);
      }),
    );
  });

  it("is far above the book only beyond what the reading can tell", () => {
    const of = (takenGrams: number) => ({ heldGrams: 2000, takenGrams, whole: false });
    expect(isFarAbove(of(2011), 11_548)).toBe(false);
    expect(isFarAbove(of(2012), 11_548)).toBe(true);
    expect(isFarAbove(of(100), 0)).toBe(false);
    expect(isFarAbove(of(2001), 0)).toBe(true);
  });
});

describe("days", () => {
  const today = day("2026-05-06");
  it("are between the scheme's first and today", () => {
    expect(refuseDay(today, today, day("2026-01-01"))).toBeNull();
    expect(refuseDay(addDays(today, 1), today, day("2026-01-01"))).toMatchObject({
      code: "future-time",
      detail: { when: "7 May 2026" },
    });
    expect(refuseDay(day("2025-12-31"), today, day("2026-01-01"))).toMatchObject({
      code: "too-long-ago",
    });
  });

  it.each([
    [null, "none"],
    ["2026-05-05", "over"],
    ["2026-05-06", "ends-soon"],
    ["2026-06-05", "ends-soon"],
    ["2026-06-06", "good"],
  ] as const)("a permit until %s is %s", (until, state) => {
    expect(permitState(until === null ? null : day(until), today)).toBe(state);
  });
});
