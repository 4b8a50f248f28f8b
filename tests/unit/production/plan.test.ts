import { describe, expect, it } from "vitest";
import type { Piece } from "@/lib/production/contract/catalogue";
import { pieceMass, planFor, sheetOf, type PlanParts } from "@/lib/production/rules/plan";
import { duration, inGrams, workingOf } from "@/lib/production/rules/working";
import { density, label, moulder, piece, press, sheet, tool } from "./parts";

const hooks = (more: Partial<PlanParts> = {}): PlanParts => ({
  piece: piece(),
  tool: tool(),
  machine: moulder(),
  density: density(),
  ...more,
});
const sheets = (more: Partial<Piece> = {}, of: Partial<PlanParts> = {}): PlanParts => ({
  piece: sheet(more),
  tool: null,
  machine: press(),
  density: density(),
  ...of,
});
const working = (pieces: number, parts: PlanParts): string[] => {
  const plan = planFor(pieces, parts);
  if (plan.kind === "lacks") throw new Error(`lacks a ${plan.what}`);
  return workingOf(pieces, plan.need, parts);
};

describe("the mass of a piece", () => {
  it("is what good ones weighed, else what was entered, else volume × density", () => {
    const bare = piece({ massMilligrams: null, volumeMm3: 27_000 });
    expect(pieceMass(bare, density())).toBe(25_785);
    expect(pieceMass(bare, density("PP"))).toBe(24_435);
    expect(pieceMass(piece(), density())).toBe(26_000);
    expect(pieceMass(piece({ weighedMilligrams: 25_300 }), density())).toBe(25_300);
    expect(pieceMass(sheet(), density())).toBe(143_250);
    expect(sheetOf(piece())).toEqual({ lengthUm: 0, widthUm: 0, thicknessUm: 0 });
  });
});

describe("a plan", () => {
  it("lacks the machine, then the tool, that its method cannot do without", () => {
    expect(planFor(40, hooks({ machine: null, tool: null }))).toEqual({
      kind: "lacks",
      what: "machine",
    });
    expect(planFor(40, hooks({ tool: null }))).toEqual({ kind: "lacks", what: "tool" });
    expect(planFor(1, sheets({}, { machine: null }))).toEqual({ kind: "lacks", what: "machine" });
    const cut = { piece: label(), tool: null, machine: null, density: density() };
    expect(planFor(20, cut)).toMatchObject({ kind: "need", need: { grams: 144, seconds: 0 } });
  });

  it("takes weighed pieces in place of the computed mass", () => {
    const weighed = hooks({ piece: piece({ weighedMilligrams: 25_000, weighedPieces: 10 }) });
    expect(planFor(40, weighed)).toMatchObject({ need: { shotMilligrams: 54_300, grams: 1136 } });
  });

  it("computes the melt of the polymer that is planned", () => {
    const pet = planFor(40, hooks({ density: density("PET") }));
    // 175 × 0.9 × 1.17
    expect(pet).toMatchObject({ need: { fillMilligrams: 184_275, fills: 7 } });
  });

  it("does not fit a barrel or a plate that is too small, and still says what it needs", () => {
    const small = moulder({ barrelMm3: 80_000 });
    expect(planFor(40, hooks({ machine: small }))).toMatchObject({
      kind: "unfit",
      unfit: { why: "shot-too-large", shotMilligrams: 56_300, fillMilligrams: 54_000 },
      need: { grams: 1176 },
    });
    const least = moulder({ leastShotMilligrams: 56_301 });
    expect(planFor(40, hooks({ machine: least }))).toMatchObject({
      unfit: { why: "shot-too-small" },
    });
    const plate = press({ plateLengthUm: 240_000, plateWidthUm: 240_000 });
    expect(planFor(1, sheets({}, { machine: plate }))).toMatchObject({
      kind: "unfit",
      unfit: { why: "sheet-too-large" },
    });
  });
});

describe("the working", () => {
  it("of a sheet is as the workshop writes it", () => {
    expect(working(1, sheets())).toEqual([
      "200 × 250 × 3 mm = 150 cm³ × 0.955 g/cm³ = 143.3 g, with 5 % trim 150.4 g",
      "1 × 150.4 g = 0.151 kg",
      "1 load × 30 min = 30 min",
    ]);
    expect(working(4, sheets({ trimThousandths: 0 }))).toEqual([
      "200 × 250 × 3 mm = 150 cm³ × 0.955 g/cm³ = 143.3 g",
      "4 × 143.3 g = 0.573 kg",
      "4 loads × 30 min = 2 h",
    ]);
    const weighed = sheets({ weighedMilligrams: 148_000, weighedPieces: 10 });
    expect(working(1, weighed)[0]).toBe("one weighed: 148.0 g, with 5 % trim 155.4 g");
  });

  it("of forty hooks can be done again by hand", () => {
    expect(working(40, hooks())).toEqual([
      "40 / (2 cavities) = 20 shots",
      "2 × 26.0 g + 4.3 g = 56.3 g a shot",
      "20 × 56.3 g + 50.0 g purge = 1.176 kg",
      "175 cm³ × 0.9 × 0.75 g/cm³ = 118.1 g a fill",
      "10 fills × 7.5 min + 20 × 1.5 min = 1 h 45 min",
    ]);
  });

  it("names good share, start-up shots, preheating, and how the mass was found", () => {
    const parts = hooks({
      piece: piece({ massMilligrams: null, volumeMm3: 27_200 }),
      tool: tool({ cavities: 1, goodThousandths: 950, startUpShots: 2, preheatMinutes: 20 }),
      machine: moulder({ purgeMilligrams: 0 }),
    });
    const lines = working(40, parts);
    expect(lines.slice(0, 4)).toEqual([
      "27.2 cm³ × 0.955 g/cm³ = 26.0 g",
      "40 / (1 cavity × 95 % good) = 43 shots",
      "+ 2 to start up = 45 shots",
      "1 × 26.0 g + 4.3 g = 30.3 g a shot",
    ]);
    expect(lines[4]).not.toContain("purge");
    expect(lines.at(-1)).toContain("+ 20 min preheat");
    const weighed = hooks({ piece: piece({ weighedMilligrams: 25_300, weighedPieces: 10 }) });
    expect(working(40, weighed)[0]).toBe("10 pieces weighed: 25.3 g each");
  });

  it("of cutting counts sheets", () => {
    const cut = { piece: label(), tool: null, machine: null, density: density() };
    expect(working(30, cut)).toEqual([
      "30 / 20 a sheet = 2 sheets",
      "200 × 250 × 3 mm = 150 cm³ × 0.955 g/cm³ = 143.3 g",
      "2 × 143.3 g = 0.287 kg",
    ]);
  });

  it.each([
    [40, "40 s"],
    [59, "59 s"],
    [60, "1 min"],
    [3000, "50 min"],
    [3600, "1 h"],
    [6300, "1 h 45 min"],
    [3599, "1 h"],
  ])("%i seconds are %s", (seconds, words) => {
    expect(duration(seconds)).toBe(words);
  });

  it("rounds milligrams to a tenth of a gram", () => {
    expect([143_250, 150_412.5, 0, 49].map(inGrams)).toEqual([
      "143.3 g",
      "150.4 g",
      "0.0 g",
      "0.0 g",
    ]);
  });
});
