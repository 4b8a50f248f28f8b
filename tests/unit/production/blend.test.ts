import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  gramsOfBlend,
  moveShare,
  sumOfShares,
  WHOLE,
  type Share,
} from "@/lib/production/rules/blend";
import { planDataSchema } from "@/lib/production/contract/plans";
import { newId } from "@/lib/core/ids";

const CODES = ["blue", "white", "grey", "black", "red", "green"];
const blend = (...thousandths: number[]): Share[] =>
  thousandths.map((share, at) => ({ colourCode: CODES[at] ?? "", thousandths: share }));
const shares = (list: readonly Share[]) => list.map(({ thousandths }) => thousandths);

/** Between one and six shares that add up to 1000, some of them zero. */
const anyBlend = fc.array(fc.integer({ min: 0, max: WHOLE }), { maxLength: 5 }).map((cuts) => {
  const ends = [0, ...cuts.sort((a, b) => a - b), WHOLE];
  return blend(...ends.slice(1).map((end, at) => end - (ends[at] ?? 0)));
});

describe("grams of a blend", () => {
  it("are its shares of the need", () => {
    expect(gramsOfBlend(1176, blend(700, 300))).toEqual([823, 353]);
    expect(gramsOfBlend(1000, blend(333, 333, 334))).toEqual([333, 333, 334]);
    expect(gramsOfBlend(10, blend(333, 333, 334))).toEqual([3, 3, 4]);
    expect(gramsOfBlend(1, blend(500, 500))).toEqual([1, 0]);
    expect(gramsOfBlend(0, blend(1000))).toEqual([0]);
  });

  it("add up to the need to the gram, none a gram or more from its exact share", () => {
    fc.assert(
      fc.property(anyBlend, fc.integer({ min: 1, max: 10_000_000 }), (of, need) => {
        const grams = gramsOfBlend(need, of);
        expect(grams.reduce((sum, part) => sum + part, 0)).toBe(need);
        grams.forEach((part, at) => {
          const exact = (need * (of[at]?.thousandths ?? 0)) / WHOLE;
          expect(Math.abs(part - exact)).toBeLessThan(1);
        });
      }),
    );
  });

  it("have no answer where nothing has a share", () => {
    expect(() => gramsOfBlend(100, blend(0, 0))).toThrow(RangeError);
  });
});

describe("moving one share", () => {
  it("lets the others give and take in proportion", () => {
    expect(shares(moveShare(blend(500, 300, 200), "blue", 750))).toEqual([750, 150, 100]);
    expect(shares(moveShare(blend(500, 300, 200), "white", 0))).toEqual([714, 0, 286]);
    expect(shares(moveShare(blend(1000, 0, 0), "blue", 400))).toEqual([400, 300, 300]);
    expect(shares(moveShare(blend(1000, 0), "white", 250))).toEqual([750, 250]);
  });

  it("stays between nothing and all, and alone it is all", () => {
    expect(shares(moveShare(blend(500, 500), "blue", 1700))).toEqual([1000, 0]);
    expect(shares(moveShare(blend(500, 500), "blue", -3))).toEqual([0, 1000]);
    expect(shares(moveShare(blend(500, 500), "blue", 333.4))).toEqual([333, 667]);
    expect(shares(moveShare(blend(1000), "blue", 10))).toEqual([1000]);
  });

  it("keeps the sum whole and the order, however often it is done", () => {
    const moves = fc.array(
      fc.record({ at: fc.nat(5), to: fc.double({ min: -50, max: 1050, noNaN: true }) }),
      { minLength: 1, maxLength: 40 },
    );
    fc.assert(
      fc.property(anyBlend, moves, (start, list) => {
        let now: Share[] = start;
        for (const { at, to } of list) {
          const code = now[at % now.length]?.colourCode ?? "";
          now = moveShare(now, code, to);
          expect(sumOfShares(now)).toBe(WHOLE);
          expect(now.map(({ colourCode }) => colourCode)).toEqual(
            start.map(({ colourCode }) => colourCode),
          );
          for (const share of shares(now)) {
            expect(Number.isInteger(share) && share >= 0).toBe(true);
          }
        }
      }),
    );
  });
});

describe("a blend as it is sent", () => {
  const problemOf = (list: Share[]) =>
    planDataSchema.safeParse({
      pieceId: newId(0),
      polymer: "PE-HD",
      toolId: null,
      machineId: null,
      wantedPieces: 1,
      shares: list,
      folded: 0,
      seed: 0,
    }).error?.issues[0]?.message;

  it("adds up to 100 %, names a colour once, and is not empty", () => {
    expect(problemOf(blend(700, 300))).toBeUndefined();
    expect(problemOf(blend(700, 299))).toBe("shares-not-whole");
    expect(problemOf(blend(700, 301))).toBe("shares-not-whole");
    expect(problemOf([])).toBe("one-at-least");
    expect(problemOf([...blend(500), ...blend(500)])).toBe("colour-twice");
  });
});
