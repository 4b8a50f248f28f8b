import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { day } from "@/lib/core/time";
import type { ColourStock } from "@/lib/production/contract/plans";
import type { Share } from "@/lib/production/rules/blend";
import {
  cautionsOf,
  dueOf,
  judgeBlend,
  LEAST_WEEKS,
  piecesFromFree,
  quantile,
  wouldDo,
} from "@/lib/production/rules/enough";
import { planFor } from "@/lib/production/rules/plan";
import { colour, density, moulder, piece, stock, tool } from "./parts";

const TODAY = day("2026-05-06");
const share = (colourCode: string, thousandths: number): Share => ({ colourCode, thousandths });
const weeks = (grams: number, count = 12) => Array.from({ length: count }, () => grams);

const gramsFor = (pieces: number): number => {
  const plan = planFor(pieces, {
    piece: piece(),
    tool: tool({ startUpShots: 2, goodThousandths: 950 }),
    machine: moulder(),
    density: density(),
  });
  if (plan.kind !== "need") throw new Error("no plan");
  return plan.need.grams;
};

describe("quantile", () => {
  it.each([
    [[1, 2, 3, 4], 0.25, 1.75],
    [[1, 2, 3, 4], 0.5, 2.5],
    [[1, 2, 3, 4], 0.75, 3.25],
    [[4, 1, 3, 2, 5], 0.5, 3],
    [[10, 2, 9], 0.25, 5.5],
    [[7], 0.75, 7],
    [[3, 1], 0, 1],
    [[3, 1], 1, 3],
    [[], 0.5, 0],
  ])("of %j at %d is %d", (values, at, expected) => {
    expect(quantile(values, at)).toBe(expected);
  });

  it("lies between the least and the most, and does not change its list", () => {
    const values = fc.array(fc.integer({ min: 0, max: 9999 }), { minLength: 1, maxLength: 12 });
    fc.assert(
      fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (list, at) => {
        const kept = [...list];
        const found = quantile(list, at);
        expect(list).toEqual(kept);
        expect(found).toBeGreaterThanOrEqual(Math.min(...list));
        expect(found).toBeLessThanOrEqual(Math.max(...list));
      }),
    );
  });
});

describe("when the missing colour should be there", () => {
  it("is the shortage at the middle week's intake, with a good and a poor week's as range", () => {
    // Sorted 100 … 1200: quartiles 375, 650, 925.
    const list = Array.from({ length: 12 }, (_, at) => ((at * 5) % 12) * 100 + 100);
    expect(dueOf(1300, list, 1000, TODAY)).toEqual({
      day: "2026-05-20",
      early: "2026-05-16",
      late: "2026-05-31",
    });
  });

  it("counts what the steps before the method leave of the intake", () => {
    expect(dueOf(700, weeks(700), 1000, TODAY)?.day).toBe("2026-05-13");
    expect(dueOf(700, weeks(700), 500, TODAY)?.day).toBe("2026-05-20");
  });

  it("is not said of too little history, of nothing coming in, and of what lies too far off", () => {
    expect(dueOf(100, weeks(700, LEAST_WEEKS - 1), 1000, TODAY)).toBeNull();
    expect(dueOf(100, weeks(700, LEAST_WEEKS), 1000, TODAY)).not.toBeNull();
    expect(dueOf(100, [], 1000, TODAY)).toBeNull();
    expect(dueOf(100, weeks(0), 1000, TODAY)).toBeNull();
    expect(dueOf(100, weeks(700), 0, TODAY)).toBeNull();
    expect(dueOf(104 * 700, weeks(700), 1000, TODAY)).not.toBeNull();
    expect(dueOf(104 * 700 + 1, weeks(700), 1000, TODAY)).toBeNull();
  });

  it("leaves the late end open where poor weeks bring nothing", () => {
    const list = [0, 0, 0, 0, 700, 700, 700, 700, 700, 700, 700, 700];
    expect(dueOf(700, list, 1000, TODAY)).toEqual({
      day: "2026-05-13",
      early: "2026-05-13",
      late: null,
    });
  });

  it("is never earlier at a poorer week", () => {
    const list = fc.array(fc.nat(2000), { minLength: 6, maxLength: 12 });
    fc.assert(
      fc.property(list, fc.integer({ min: 1, max: 20_000 }), (of, short) => {
        const due = dueOf(short, of, 900, TODAY);
        if (!due) return;
        expect(due.early <= due.day).toBe(true);
        expect(due.late === null || due.late >= due.day).toBe(true);
        expect(due.early > TODAY).toBe(true);
      }),
    );
  });
});

describe("a blend against the stock", () => {
  it("has a need, and a shortage with its day, for each colour", () => {
    const of = stock([colour("blue", 823), colour("white", 300, { weeks: weeks(53) })]);
    const needs = judgeBlend(1176, [share("blue", 700), share("white", 300)], of);
    expect(needs).toMatchObject([
      { colour: { code: "blue" }, grams: 823, shortGrams: 0, due: null },
      { colour: { code: "white" }, grams: 353, shortGrams: 53, due: { day: "2026-05-13" } },
    ]);
  });

  it("says no day of a short colour whose history is too short", () => {
    const of = stock([colour("blue", 0, { weeks: weeks(500, 3) })]);
    expect(judgeBlend(100, [share("blue", 1000)], of)).toMatchObject([
      { shortGrams: 100, due: null },
    ]);
  });

  it("is short of all of a colour that the stock does not know", () => {
    const of = stock([colour("blue", 5000)]);
    const blend = [share("blue", 500), share("gone", 500)];
    const needs = judgeBlend(1000, blend, of);
    expect(needs.map(({ colour: { code }, shortGrams }) => [code, shortGrams])).toEqual([
      ["blue", 0],
      ["gone", 500],
    ]);
    expect(piecesFromFree(gramsFor, blend, of, 1000)).toBe(0);
  });
});

describe("pieces that the free stock makes", () => {
  it("count start-up shots and the purge", () => {
    const blue = [share("blue", 1000)];
    const made = (free: number) =>
      piecesFromFree(gramsFor, blue, stock([colour("blue", free)]), 1000);
    // ceil(40 / 1.9) + 2 = 24 shots of 56.3 g and 50 g: 1402 g; one piece takes 3 shots: 219 g.
    expect(gramsFor(40)).toBe(1402);
    expect(made(1402)).toBeGreaterThanOrEqual(40);
    expect(made(1345)).toBe(39);
    expect(made(218)).toBe(0);
    expect(made(219)).toBe(1);
    expect(made(0)).toBe(0);
  });

  const MOST = 80;
  const stockOf = (shares: Share[], free: number[]) =>
    stock(shares.map(({ colourCode }, at) => colour(colourCode, free[at] ?? 0)));
  const covered = (pieces: number, shares: Share[], free: number[]) =>
    judgeBlend(gramsFor(pieces), shares, stockOf(shares, free)).every(
      (need) => need.shortGrams === 0,
    );
  const counted = (shares: Share[], free: number[]) => {
    let last = 0;
    for (let pieces = 1; pieces <= MOST; pieces += 1) {
      if (covered(pieces, shares, free)) last = pieces;
    }
    return last;
  };

  it("agree with counting one by one (random, one colour or two)", () => {
    const free = fc.integer({ min: 0, max: 3000 });
    fc.assert(
      fc.property(fc.nat(1000), free, free, (first, a, b) => {
        const shares = [share("blue", first), share("white", 1000 - first)];
        const found = piecesFromFree(gramsFor, shares, stockOf(shares, [a, b]), MOST);
        expect(found).toBe(counted(shares, [a, b]));
      }),
      { numRuns: 60 },
    );
  });

  it("are never more than the stock covers, in blends of many colours as well (random)", () => {
    const free = fc.array(fc.integer({ min: 0, max: 2000 }), { minLength: 4, maxLength: 4 });
    const cuts = fc.array(fc.integer({ min: 1, max: 999 }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(cuts, free, (at, grams) => {
        const ends = [0, ...at.sort((a, b) => a - b), 1000];
        const shares = ["blue", "white", "grey", "red"].map((code, index) =>
          share(code, (ends[index + 1] ?? 0) - (ends[index] ?? 0)),
        );
        const found = piecesFromFree(gramsFor, shares, stockOf(shares, grams), MOST);
        if (found > 0) expect(covered(found, shares, grams)).toBe(true);
        expect(found).toBeLessThanOrEqual(counted(shares, grams));
        // Of three colours and more, a larger need can round one of them down: a gram's worth may be missed.
        const lessOne = grams.map((one) => one - 1);
        expect(found).toBeGreaterThanOrEqual(counted(shares, lessOne));
      }),
      { numRuns: 60 },
    );
  });
});

describe("colours in a short one's place", () => {
  it("would do in full, are not in the blend already, and the fullest comes first", () => {
    const of = stock([
      colour("blue", 10),
      colour("white", 900),
      colour("grey", 499),
      colour("red", 500),
      colour("green", 800),
    ]);
    const blend = [share("blue", 500), share("white", 500)];
    const [blue] = judgeBlend(1000, blend, of);
    if (!blue) throw new Error("no blue");
    expect(wouldDo(blue, blend, of).map(({ code }) => code)).toEqual(["green", "red"]);
  });
});

describe("cautions", () => {
  const needs = (list: ColourStock[], shares: Share[]) => judgeBlend(1000, shares, stock(list));
  const half = [share("blue", 500), share("white", 500)];

  it("tell of material heated before above the piece's largest share, not at it", () => {
    // Half of the blue's 1000 g and none of the white's: a quarter of the blend.
    const list = [
      colour("blue", 600, { reservedGrams: 400, heatedGrams: 500 }),
      colour("white", 1000),
    ];
    expect(cautionsOf(needs(list, half), 249)).toEqual([
      { kind: "heated", thousandths: 250, mostThousandths: 249 },
    ]);
    expect(cautionsOf(needs(list, half), 250)).toEqual([]);
    expect(cautionsOf(needs(list, half), null)).toEqual([]);
  });

  it("tell of lids and bottles joined, which flow differently", () => {
    const list = [
      colour("blue", 1000, { kinds: ["lids"] }),
      colour("white", 1000, { kinds: ["bottles", "tubs"] }),
    ];
    expect(cautionsOf(needs(list, half), null)).toEqual([{ kind: "flow" }]);
    const alike = [
      colour("blue", 1000, { kinds: ["lids"] }),
      colour("white", 1000, { kinds: ["tubs"] }),
    ];
    expect(cautionsOf(needs(alike, half), null)).toEqual([]);
  });

  it("stay quiet where nothing is there", () => {
    expect(cautionsOf(needs([colour("blue", 0), colour("white", 0)], half), 0)).toEqual([]);
    expect(cautionsOf([], 0)).toEqual([]);
  });
});
