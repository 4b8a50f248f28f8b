import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { getRejectBin } from "@/lib/removals/queries/reject-bin";
import { listRemovals } from "@/lib/removals/queries/removals";
import { refusalOf } from "@/tests/support/command-cases";
import { removalDesk, type RemovalDesk } from "@/tests/support/removal-desk";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

let scheme: TestScheme;
let desk: RemovalDesk;
beforeEach(() => {
  scheme = newScheme();
  desk = removalDesk(scheme);
});
afterEach(() => scheme.close());

describe("what was taken away", () => {
  it("goes in pages, newest first, and counts what is unproven", () => {
    for (let at = 0; at < 53; at += 1) desk.take({ grams: 5 }, instant(NOON + at));
    const first = listRemovals(scheme.ctx("volunteer"), undefined);
    expect(first.removals).toHaveLength(50);
    expect(first.unproven).toEqual({ count: 53, grams: 265 });
    const second = listRemovals(scheme.ctx("volunteer"), first.next ?? undefined);
    expect(second.removals).toHaveLength(3);
    expect(second.next).toBeNull();
    const times = [...first.removals, ...second.removals].map(({ recordedAt }) => recordedAt);
    expect(times).toEqual([...times].sort((a, b) => b - a));
    expect(refusalOf(() => listRemovals(scheme.ctx("donor"), undefined))).toBe("forbidden");
  });

  it("knows since when the bin has not been empty", () => {
    desk.take({ grams: 2000 });
    expect(getRejectBin(scheme.ctx("volunteer"))).toEqual({ heldGrams: 0, since: null });
    const later = instant(NOON + 86_400_000);
    desk.fill(0, 0, 700, later);
    desk.fill(0, 0, 100, instant(later + 5));
    expect(getRejectBin(scheme.ctx("volunteer"))).toEqual({ heldGrams: 800, since: later });
  });
});
