import { describe, expect, it } from "vitest";
import { awaitsWeighing, isSpare, mayMove, stateAgeDays } from "@/lib/bags/rules/bag-states";
import { BAG_STATES, type BagState } from "@/lib/bags/terms";
import { instant } from "@/lib/core/time";

describe("mayMove", () => {
  it("allows just these moves", () => {
    const allowed = BAG_STATES.flatMap((from) =>
      BAG_STATES.filter((to) => mayMove(from, to)).map((to) => `${from} > ${to}`),
    );
    expect(allowed).toEqual([
      "printed > out",
      "printed > picked-up",
      "printed > weighed",
      "printed > closed",
      "out > picked-up",
      "out > weighed",
      "picked-up > weighed",
      "weighed > picked-up",
      "weighed > sorted",
      "sorted > weighed",
      "sorted > closed",
    ]);
  });
});

describe("awaitsWeighing", () => {
  it("is so until the first weigh-in", () => {
    expect(BAG_STATES.filter(awaitsWeighing)).toEqual(["printed", "out", "picked-up"]);
  });
});

describe("isSpare", () => {
  it.each<[BagState, string | null, boolean]>([
    ["printed", null, true],
    ["printed", "some-point", false],
    ["picked-up", null, false],
    ["closed", null, false],
  ])("%s with point %s: %s", (state, pointId, spare) => {
    expect(isSpare({ state, pointId })).toBe(spare);
  });
});

describe("stateAgeDays", () => {
  const at = (text: string) => instant(Date.parse(text));

  it("counts days of the scheme's calendar, not spans of 24 hours", () => {
    const [evening, morning] = [at("2026-05-06T22:30:00Z"), at("2026-05-07T05:00:00Z")];
    expect(stateAgeDays(evening, morning, "UTC")).toBe(1);
    // In Dublin it is half past eleven in the evening, then six in the morning.
    expect(stateAgeDays(evening, morning, "Europe/Dublin")).toBe(1);
    // In Auckland both are on 7 May.
    expect(stateAgeDays(evening, morning, "Pacific/Auckland")).toBe(0);
  });

  it("is never negative", () => {
    expect(stateAgeDays(at("2026-05-08T00:00:00Z"), at("2026-05-06T00:00:00Z"), "UTC")).toBe(0);
  });
});
