import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { sentence } from "@/lib/core/messages";
import { day, instant } from "@/lib/core/time";
import { mayStillUndo } from "@/lib/core/undo";
import {
  isBelowMinimum,
  mpeOf,
  netGramsOf,
  refuseReading,
  refuseReadings,
  stepWords,
  type NamedScale,
  type Reading,
} from "@/lib/scales/rules/reading";
import {
  isFarAboveUsual,
  isInFuture,
  materialOf,
  missingOfMaterial,
  openQuestions,
  refuseTime,
  usualBag,
  whenWords,
} from "@/lib/weighing/rules";

/** Class III, Max 15 kg, e = d = 5 g. */
const BENCH: NamedScale = {
  name: "Bench scale",
  class: "III",
  maxMilligrams: 15_000_000,
  eMilligrams: 5_000,
  dMilligrams: 5_000,
  statedAccuracyMilligrams: null,
};
const reading = (
  grossMilligrams: number,
  containerTareMilligrams = 0,
  sackTareMilligrams = 0,
): Reading => ({
  grossMilligrams,
  containerId: null,
  containerTareMilligrams,
  sackId: null,
  sackTareMilligrams,
});
const NOON = instant(Date.UTC(2026, 4, 6, 12));

describe("net", () => {
  it("is gross less both tares, rounded once on the sum", () => {
    expect(netGramsOf([reading(2_340_000, 160_000, 20_000)])).toBe(2160);
    // 0.4 g three times: each alone rounds to 0, together they are 1 g.
    expect(netGramsOf([reading(400), reading(400), reading(400)])).toBe(1);
    expect(netGramsOf([reading(1_500)])).toBe(2);
  });

  const anyReading = fc
    .tuple(
      fc.integer({ min: 0, max: 30_000_000 }),
      fc.integer({ min: 0, max: 2_000_000 }),
      fc.integer({ min: 0, max: 200_000 }),
    )
    .map(([gross, container, sack]) => reading(gross, container, sack));

  it("does not depend on the order of the readings, and is within half a gram of the sum", () => {
    fc.assert(
      fc.property(fc.array(anyReading, { minLength: 1, maxLength: 20 }), (readings) => {
        const net = netGramsOf(readings);
        expect(netGramsOf([...readings].reverse())).toBe(net);
        const exact = readings.reduce(
          (sum, one) =>
            sum + one.grossMilligrams - one.containerTareMilligrams - one.sackTareMilligrams,
          0,
        );
        expect(Math.abs(net * 1000 - exact)).toBeLessThanOrEqual(500);
      }),
    );
  });

  it("is above zero and at most the grosses whenever the readings are not refused", () => {
    fc.assert(
      fc.property(fc.array(anyReading, { minLength: 1, maxLength: 20 }), (readings) => {
        const inSteps = readings.map((one) => ({
          ...one,
          grossMilligrams: one.grossMilligrams - (one.grossMilligrams % 5_000),
        }));
        if (refuseReadings(BENCH, inSteps)) return;
        const net = netGramsOf(inSteps);
        expect(net).toBeGreaterThan(0);
        expect(net * 1000).toBeLessThanOrEqual(
          inSteps.reduce((sum, one) => sum + one.grossMilligrams, 0),
        );
      }),
    );
  });
});

describe("refusals", () => {
  const words = (one: Reading): string | null => {
    const refusal = refuseReading(BENCH, one, 0);
    return refusal && sentence(refusal.code, refusal.detail);
  };

  it("takes what the scale can have shown", () => {
    expect(words(reading(15_000_000))).toBeNull();
    expect(words(reading(5_000, 5_000))).toBeNull();
  });

  it("says why not, with the figures", () => {
    expect(words(reading(15_005_000))).toContain("at most 15.000 kg; 15.005 kg");
    expect(words(reading(2_343_000))).toBe(
      "The scale shows steps of 5 g. 2.343 kg cannot be right. Nothing was saved; read it again.",
    );
    expect(words(reading(1_000_000, 900_000, 200_000))).toContain(
      "weigh 1.100 kg, more than the 1.000 kg",
    );
  });

  it("names the reading that is wrong, and refuses a bag of nothing", () => {
    expect(refuseReadings(BENCH, [reading(5_000), reading(7_000)])?.path).toEqual([
      "readings",
      1,
      "grossMilligrams",
    ]);
    expect(refuseReadings(BENCH, [reading(5_000, 5_000)])?.code).toBe("net-zero");
  });

  it("says a step as a person does", () => {
    expect([5_000, 500, 20_000, 1_000_000, 50].map(stepWords)).toEqual([
      "5 g",
      "0.5 g",
      "20 g",
      "1000 g",
      "0.05 g",
    ]);
  });

  it("refuses a time before the scheme's first day, by its own calendar", () => {
    const scheme = { firstDay: day("2026-05-06"), timeZone: "Pacific/Auckland" };
    // Noon in UTC is midnight in Auckland: the 6th has ended there, the 5th ends twelve hours before.
    expect(refuseTime(NOON, scheme)).toBeNull();
    expect(refuseTime(instant(Date.UTC(2026, 4, 5, 11, 59)), scheme)?.code).toBe("too-long-ago");
    expect(refuseTime(instant(Date.UTC(2026, 4, 5, 12)), scheme)).toBeNull();
  });
});

describe("what the scale can tell", () => {
  it("marks a bag with a reading under 20 e", () => {
    expect(isBelowMinimum(BENCH, [reading(100_000)])).toBe(false);
    expect(isBelowMinimum(BENCH, [reading(500_000), reading(95_000)])).toBe(true);
  });

  it("adds the errors of every reading, a listed tare being one too", () => {
    // In service, twice Table 6: up to 500 e ±1 e, up to 2000 e ±2 e, above ±3 e.
    expect(mpeOf(BENCH, [reading(2_500_000)])).toBe(5_000);
    expect(mpeOf(BENCH, [reading(2_505_000)])).toBe(10_000);
    expect(mpeOf(BENCH, [reading(10_005_000), reading(2_500_000)])).toBe(20_000);
    expect(mpeOf(BENCH, [reading(2_500_000, 1_600_000, 20_000)])).toBe(5_000);
    const listed = { ...reading(2_500_000, 1_600_000, 20_000), containerId: "c", sackId: "s" };
    expect(mpeOf(BENCH, [listed])).toBe(15_000);
  });
});

describe("plausibility", () => {
  it("takes the middle of the last bags as usual, once there are three", () => {
    expect(usualBag([1000, 5000])).toBeNull();
    expect(usualBag([9000, 1000, 2000])).toBe(2000);
    expect(usualBag([4000, 1000, 2000, 3000])).toBe(2000);
  });

  it("asks above three times the usual only", () => {
    expect(isFarAboveUsual(6000, 2000)).toBe(false);
    expect(isFarAboveUsual(6001, 2000)).toBe(true);
    expect(isFarAboveUsual(1_000_000, null)).toBe(false);
  });

  it("allows a clock two minutes ahead", () => {
    expect(isInFuture(instant(NOON + 120_000), NOON)).toBe(false);
    expect(isInFuture(instant(NOON + 120_001), NOON)).toBe(true);
  });

  it("asks each question until it was answered", () => {
    expect(openQuestions(["far-above-usual", "future-time"], ["far-above-usual"])).toEqual([
      "future-time",
    ]);
  });
});

describe("one kind", () => {
  it("needs a polymer, a kind and a colour, and Mixed is no polymer", () => {
    const all = { polymer: "PE-HD", kind: "lids", colourCode: "blue" } as const;
    expect(materialOf(all)).toEqual(all);
    expect(missingOfMaterial(all)).toBeNull();
    expect(missingOfMaterial({ ...all, polymer: "mixed" })).toBe("polymer");
    expect(missingOfMaterial({ ...all, kind: null })).toBe("kind");
    expect(missingOfMaterial({ ...all, colourCode: null })).toBe("colourCode");
    expect(materialOf({ ...all, polymer: "mixed" })).toBeNull();
    expect(materialOf({ ...all, polymer: "not-sure" })).not.toBeNull();
  });
});

describe("time", () => {
  it("closes undo after ten minutes from recording", () => {
    expect(mayStillUndo(NOON, instant(NOON + 600_000))).toBe(true);
    expect(mayStillUndo(NOON, instant(NOON + 600_001))).toBe(false);
  });

  it("says when, in the scheme's zone", () => {
    expect(whenWords(NOON, "Europe/London")).toBe("6 May 2026, 13:00");
  });
});
