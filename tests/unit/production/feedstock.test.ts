/** What a plan needs. The two check values of common practice have no source, and are marked so. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  cuttingNeed,
  fillOf,
  massOf,
  mostPieces,
  mouldingNeed,
  pressingNeed,
  refuseFit,
  sheetsOnPlate,
  sheetVolume,
  shotsFor,
  type MouldingInput,
} from "@/lib/production/rules/feedstock";

const SHEET = { lengthUm: 200_000, widthUm: 250_000, thicknessUm: 3_000 };
const PLATE = { plateLengthUm: 300_000, plateWidthUm: 300_000 };
const pressing = {
  sheet: SHEET,
  trimThousandths: 50,
  mgPerCm3: 955,
  weighedMilligrams: null,
  plate: PLATE,
  meltSeconds: 1200,
  cycleSeconds: 600,
};
const hook: MouldingInput = {
  cavities: 2,
  goodThousandths: 1000,
  startUpShots: 0,
  pieceMilligrams: 26_000,
  runnerMilligrams: 4_300,
  purgeMilligrams: 50_000,
  barrel: { barrelMm3: 175_000, usableThousandths: 900 },
  meltMgPerCm3: 750,
  preheatSeconds: 0,
  meltSeconds: 450,
  cycleSeconds: 90,
};

describe("pressing", () => {
  it("takes roughly 150 g for a sheet of 200 by 250 by 3 mm of HDPE (common practice, no source)", () => {
    expect(sheetVolume(SHEET)).toBe(150_000);
    expect(massOf(150_000, 955)).toBe(143_250);
    const one = pressingNeed(1, pressing);
    expect(one).toMatchObject({ pieceMilligrams: 143_250, grams: 151, goes: 1, fills: 1 });
    expect(Math.abs(one.grams - 150)).toBeLessThan(150 * 0.05);
  });

  it("rounds what is taken out of stock up, once, at the end", () => {
    // 10 × 143.25 g × 1.05 = 1504.125 g
    expect(pressingNeed(10, pressing).grams).toBe(1505);
    expect(pressingNeed(10, { ...pressing, trimThousandths: 0 }).grams).toBe(1433);
  });

  it("uses the mass of good sheets that were weighed", () => {
    expect(pressingNeed(2, { ...pressing, weighedMilligrams: 150_000 })).toMatchObject({
      pieceMilligrams: 150_000,
      grams: 315,
    });
  });

  it("loads the plate as full as sheets lie on it, either way round", () => {
    expect(sheetsOnPlate(SHEET, PLATE)).toBe(1);
    expect(sheetsOnPlate(SHEET, { plateLengthUm: 250_000, plateWidthUm: 200_000 })).toBe(1);
    expect(sheetsOnPlate(SHEET, { plateLengthUm: 250_000, plateWidthUm: 400_000 })).toBe(2);
    expect(sheetsOnPlate(SHEET, { plateLengthUm: 249_999, plateWidthUm: 249_999 })).toBe(0);
    const two = { ...pressing, plate: { plateLengthUm: 400_000, plateWidthUm: 250_000 } };
    expect(pressingNeed(5, two)).toMatchObject({ goes: 5, fills: 3, seconds: 3 * 1800 });
  });
});

describe("moulding", () => {
  it("does the worked example: forty hooks of 26.0 g in a tool of two cavities", () => {
    expect(mouldingNeed(40, hook)).toEqual({
      grams: 1176,
      pieceMilligrams: 26_000,
      goes: 20,
      fills: 10,
      seconds: 105 * 60,
      shotMilligrams: 56_300,
      fillMilligrams: 118_125,
      purgeMilligrams: 50_000,
    });
    // Melting a barrel of HDPE takes seven to eight minutes: common practice, no source.
    expect(hook.meltSeconds / 60).toBe(7.5);
  });

  it("fills by barrel × usable share × density of the melt", () => {
    expect(fillOf({ barrelMm3: 175_000, usableThousandths: 900 }, 750)).toBe(118_125);
    expect(fillOf({ barrelMm3: 100_000, usableThousandths: 1000 }, 955)).toBe(95_500);
  });

  it.each([
    [40, { cavities: 2, goodThousandths: 1000, startUpShots: 0 }, 20],
    [41, { cavities: 2, goodThousandths: 1000, startUpShots: 0 }, 21],
    [40, { cavities: 2, goodThousandths: 1000, startUpShots: 3 }, 23],
    [40, { cavities: 1, goodThousandths: 900, startUpShots: 0 }, 45],
    [45, { cavities: 1, goodThousandths: 900, startUpShots: 2 }, 52],
    [1, { cavities: 8, goodThousandths: 500, startUpShots: 0 }, 1],
    [90, { cavities: 4, goodThousandths: 750, startUpShots: 0 }, 30],
  ])("%i pieces with %j: %i shots", (pieces, of, shots) => {
    expect(shotsFor(pieces, of)).toBe(shots);
  });

  it("adds start-up shots, preheating and the share that is not good", () => {
    const need = mouldingNeed(40, {
      ...hook,
      goodThousandths: 900,
      startUpShots: 3,
      preheatSeconds: 1200,
    });
    // ceil(40 / 1.8) = 23, and 3; two shots a fill.
    expect(need).toMatchObject({ goes: 26, fills: 13, grams: Math.ceil(26 * 56.3 + 50) });
    expect(need.seconds).toBe(1200 + 13 * 450 + 26 * 90);
  });

  it("never asks for less than its pieces weigh, nor for more when fewer are wanted", () => {
    const inputs = fc.record({
      cavities: fc.integer({ min: 1, max: 8 }),
      goodThousandths: fc.integer({ min: 1, max: 1000 }),
      startUpShots: fc.integer({ min: 0, max: 20 }),
      pieceMilligrams: fc.integer({ min: 1, max: 500_000 }),
      runnerMilligrams: fc.integer({ min: 0, max: 50_000 }),
      purgeMilligrams: fc.integer({ min: 0, max: 200_000 }),
    });
    fc.assert(
      fc.property(inputs, fc.integer({ min: 2, max: 10_000 }), (input, pieces) => {
        const need = mouldingNeed(pieces, { ...hook, ...input });
        expect(need.grams * 1000).toBeGreaterThanOrEqual(pieces * input.pieceMilligrams);
        const made = (need.goes - input.startUpShots) * input.cavities * input.goodThousandths;
        expect(made).toBeGreaterThanOrEqual(pieces * 1000);
        expect(mouldingNeed(pieces - 1, { ...hook, ...input }).grams).toBeLessThanOrEqual(
          need.grams,
        );
      }),
    );
  });
});

describe("cutting", () => {
  const input = {
    sheet: SHEET,
    mgPerCm3: 955,
    piecesPerSheet: 20,
    pieceMilligrams: 6_000,
    cycleSeconds: 120,
  };
  it.each([
    [1, 1],
    [20, 1],
    [21, 2],
    [40, 2],
  ])("of %i pieces takes %i whole sheets", (pieces, sheets) => {
    expect(cuttingNeed(pieces, input)).toMatchObject({
      goes: sheets,
      grams: Math.ceil(sheets * 143.25),
      seconds: sheets * 120,
      fills: 1,
      shotMilligrams: null,
      fillMilligrams: null,
    });
  });
});

describe("what refuses a plan", () => {
  const machine = { leastShotMilligrams: 10_000 };
  const need = (more: Partial<MouldingInput>) => mouldingNeed(1, { ...hook, ...more });

  it("is a shot larger than the barrel gives, to the milligram", () => {
    const fits = need({ pieceMilligrams: 56_912 });
    expect(fits.shotMilligrams).toBe(118_124);
    expect(refuseFit("moulding", fits, machine, true)).toBeNull();
    const full = need({ pieceMilligrams: 59_000, runnerMilligrams: 125 });
    expect(refuseFit("moulding", full, machine, true)).toBeNull();
    const large = need({ pieceMilligrams: 59_000, runnerMilligrams: 126 });
    expect(refuseFit("moulding", large, machine, true)).toEqual({
      why: "shot-too-large",
      shotMilligrams: 118_126,
      fillMilligrams: 118_125,
    });
  });

  it("is a shot under the machine's least", () => {
    const small = need({ cavities: 1, pieceMilligrams: 5_000 });
    expect(refuseFit("moulding", small, machine, true)).toEqual({
      why: "shot-too-small",
      shotMilligrams: 9_300,
      leastShotMilligrams: 10_000,
    });
    const least = need({ cavities: 1, pieceMilligrams: 5_700 });
    expect(refuseFit("moulding", least, machine, true)).toBeNull();
    expect(refuseFit("moulding", small, { leastShotMilligrams: null }, true)).toBeNull();
    expect(refuseFit("moulding", small, null, true)).toBeNull();
  });

  it("is a sheet larger than the plate, of pressing alone", () => {
    const sheets = pressingNeed(1, pressing);
    expect(refuseFit("pressing", sheets, null, true)).toBeNull();
    expect(refuseFit("pressing", sheets, null, false)).toEqual({ why: "sheet-too-large" });
    const cut = cuttingNeed(1, { ...pressing, piecesPerSheet: 1, pieceMilligrams: 1 });
    expect(refuseFit("cutting", cut, null, false)).toBeNull();
  });
});

describe("mostPieces", () => {
  it("is the last count that is covered (checked one by one)", () => {
    const limit = fc.integer({ min: 0, max: 60 });
    fc.assert(
      fc.property(limit, limit, (last, most) => {
        let counted = 0;
        while (counted < most && counted + 1 <= last) counted += 1;
        expect(mostPieces((pieces) => pieces <= last, most)).toBe(counted);
      }),
    );
  });
});
