/** Splits worked by hand from the written rules (ledger.md, "Splitting"). */
import { describe, expect, it } from "vitest";
import { split, type DraftLine, type Line } from "@/lib/ledger/rules/split";
import { REJECT, type Account, type EntryKind } from "@/lib/ledger/terms";

type Keyed = Record<number, number>;
type Held = { grams: number; O: Map<number, number>; H: Map<number, number> };

const [BLUE, RED, REGRIND] = [3, 4, 5];
const [LOT, OTHER_LOT, RUN, BIN, BATCH] = [1, 2, 3, 4, 5];

const mapOf = (parts: Keyed) => new Map(Object.entries(parts).map(([key, g]) => [Number(key), g]));
const sum = (map: ReadonlyMap<number, number>) => [...map.values()].reduce((a, b) => a + b, 0);

/** Holdings by "holder/material"; whatever is not named is empty. */
function shed(contents: Record<string, { O: Keyed; H: Keyed }>) {
  const held = new Map<string, Held>(
    Object.entries(contents).map(([name, { O, H }]) => [
      name,
      { grams: sum(mapOf(O)), O: mapOf(O), H: mapOf(H) },
    ]),
  );
  return (holder: number, material: number): Held => {
    const name = `${holder}/${material}`;
    const found = held.get(name) ?? { grams: 0, O: new Map(), H: new Map() };
    held.set(name, found);
    return found;
  };
}

const holderLine = (
  account: "lot" | "run" | "reject-bin" | "pieces",
  holderId: number,
  materialId: number,
  grams: number,
): DraftLine => ({ account, holderId, materialId, grams });
const outside = (account: "loss" | "difference" | "disposed", grams: number): DraftLine => ({
  account,
  grams,
});

/** The lines of an account as [material, parts by origin, parts by times heated]. */
function given(lines: readonly Line[], account: Account, holder: number | null = null) {
  return lines
    .filter((line) => line.account === account && line.grams > 0 && line.holderId === holder)
    .map(({ materialId, parts }) => [
      materialId,
      Object.fromEntries(parts.O),
      Object.fromEntries(parts.H),
    ]);
}

/** Splits, and holds every line to its parts and the entry to zero. */
function entry(kind: EntryKind, lines: DraftLine[], holdings: ReturnType<typeof shed>): Line[] {
  const result = split(kind, lines, holdings);
  expect(result.reduce((total, line) => total + line.grams, 0)).toBe(0);
  for (const { grams, parts } of result) {
    for (const dim of [parts.O, parts.H]) {
      expect(dim.reduce((total, [, part]) => total + part, 0)).toBe(grams);
    }
  }
  return result;
}

describe("what leaves takes every part in proportion", () => {
  it("gives the odd gram of a tie to the lower key", () => {
    // 4 of 3+3+3: each 1 and a remainder of a third; the odd gram goes to origin 1.
    const holdings = shed({ "1/3": { O: { 1: 3, 2: 3, 7: 3 }, H: { 0: 9 } } });
    const lines = entry(
      "removal",
      [holderLine("lot", LOT, BLUE, -4), outside("disposed", 4)],
      holdings,
    );
    expect(given(lines, "disposed")).toEqual([[BLUE, { 1: 2, 2: 1, 7: 1 }, { 0: 4 }]]);
    expect(holdings(LOT, BLUE)).toEqual({
      grams: 5,
      O: mapOf({ 1: 1, 2: 2, 7: 2 }),
      H: mapOf({ 0: 5 }),
    });
  });

  it("splits outputs one after another from what is left, the last taking the rest", () => {
    // Pool 7+3. Lot 6: 4.2, 1.8 → 4, 2. Left 3+1; bin 3: 2.25, 0.75 → 2, 1. Left 1+0 is lost.
    const holdings = shed({ "1/3": { O: { 1: 7, 2: 3 }, H: { 0: 5, 1: 5 } } });
    const lines = entry(
      "step",
      [
        outside("loss", 1),
        holderLine("reject-bin", BIN, REJECT, 3),
        holderLine("lot", LOT, BLUE, -10),
        holderLine("lot", OTHER_LOT, RED, 6),
      ],
      holdings,
    );
    // Heated: lot 3, 3. Left 2+2; bin 1.5 each → 2, 1 (a tie). Left 0+1.
    expect(given(lines, "lot", OTHER_LOT)).toEqual([[RED, { 1: 4, 2: 2 }, { 0: 3, 1: 3 }]]);
    expect(given(lines, "reject-bin", BIN)).toEqual([[REJECT, { 1: 2, 2: 1 }, { 0: 2, 1: 1 }]]);
    expect(given(lines, "loss")).toEqual([[BLUE, { 1: 1 }, { 1: 1 }]]);
  });

  it("pools several sources", () => {
    const holdings = shed({
      "1/3": { O: { 1: 10 }, H: { 0: 10 } },
      "2/4": { O: { 1: 10, 2: 20 }, H: { 0: 30 } },
    });
    // Taken: blue 10 of origin 1; red 15 as 5, 10. Lot 20: blue 8, red 12 (4, 8). Lost: blue 2, red 3 (1, 2).
    const lines = entry(
      "step",
      [
        holderLine("lot", LOT, BLUE, -10),
        holderLine("lot", OTHER_LOT, RED, -15),
        holderLine("lot", 9, REGRIND, 20),
        outside("loss", 5),
      ],
      holdings,
    );
    expect(given(lines, "lot", 9)).toEqual([[REGRIND, { 1: 12, 2: 8 }, { 0: 20 }]]);
    expect(given(lines, "loss")).toEqual([
      [BLUE, { 1: 2 }, { 0: 2 }],
      [RED, { 1: 1, 2: 2 }, { 0: 3 }],
    ]);
  });
});

describe("what a run gives out", () => {
  const twoColours = () =>
    shed({
      "3/3": { O: { 1: 60 }, H: { 0: 60 } },
      "3/4": { O: { 2: 40 }, H: { 1: 40 } },
    });
  const wholeRun = [holderLine("run", RUN, BLUE, -60), holderLine("run", RUN, RED, -40)];

  it("is heated once more, three times at most", () => {
    const holdings = shed({ "3/3": { O: { 1: 10 }, H: { 0: 1, 2: 4, 3: 5 } } });
    const lines = entry(
      "finish",
      [holderLine("run", RUN, BLUE, -10), holderLine("pieces", BATCH, BLUE, 10)],
      holdings,
    );
    expect(given(lines, "pieces", BATCH)).toEqual([[BLUE, { 1: 10 }, { 1: 1, 3: 9 }]]);
  });

  it("is not heated by cutting", () => {
    const holdings = shed({ "3/3": { O: { 1: 10 }, H: { 1: 10 } } });
    const lines = entry(
      "cut",
      [holderLine("run", RUN, BLUE, -10), holderLine("pieces", BATCH, BLUE, 10)],
      holdings,
    );
    expect(given(lines, "pieces", BATCH)).toEqual([[BLUE, { 1: 10 }, { 1: 10 }]]);
  });

  it("is heated also in a lot of its own material, which takes that material first", () => {
    const lines = entry(
      "finish",
      [
        ...wholeRun,
        holderLine("lot", LOT, RED, 30),
        holderLine("lot", OTHER_LOT, REGRIND, 14),
        outside("loss", 56),
      ],
      twoColours(),
    );
    // Red 30, heated once more. Left blue 60, red 10. Regrind 14: 12, 2, heated once more. Lost: blue 48, red 8.
    expect(given(lines, "lot", LOT)).toEqual([[RED, { 2: 30 }, { 2: 30 }]]);

    expect(given(lines, "lot", OTHER_LOT)).toEqual([[REGRIND, { 1: 12, 2: 2 }, { 1: 12, 2: 2 }]]);
    expect(given(lines, "loss")).toEqual([
      [BLUE, { 1: 48 }, { 1: 48 }],
      [RED, { 2: 8 }, { 2: 8 }],
    ]);
  });

  it("comes back unused, by a return, as it was", () => {
    const lines = entry(
      "return",
      [holderLine("run", RUN, RED, -30), holderLine("lot", LOT, RED, 30)],
      twoColours(),
    );
    expect(given(lines, "lot", LOT)).toEqual([[RED, { 2: 30 }, { 1: 30 }]]);
  });

  it("fills a lot beyond what was drawn of it from all that is left, heated", () => {
    const lines = entry(
      "finish",
      [...wholeRun, holderLine("lot", LOT, RED, 50), outside("loss", 50)],
      twoColours(),
    );
    expect(given(lines, "lot", LOT)).toEqual([[RED, { 1: 10, 2: 40 }, { 1: 10, 2: 40 }]]);
    expect(given(lines, "loss")).toEqual([[BLUE, { 1: 50 }, { 1: 50 }]]);
  });

  it("stands, as pieces, in the rows it left", () => {
    const lines = entry(
      "finish",
      [...wholeRun, holderLine("pieces", BATCH, BLUE, 50), outside("loss", 50)],
      twoColours(),
    );
    expect(given(lines, "pieces", BATCH)).toEqual([
      [BLUE, { 1: 30 }, { 1: 30 }],
      [RED, { 2: 20 }, { 2: 20 }],
    ]);
  });

  it("loses the odd gram of a tie from the lower material", () => {
    const holdings = shed({
      "3/3": { O: { 9: 1 }, H: { 0: 1 } },
      "3/4": { O: { 1: 1 }, H: { 0: 1 } },
    });
    const lines = entry(
      "finish",
      [
        holderLine("run", RUN, BLUE, -1),
        holderLine("run", RUN, RED, -1),
        holderLine("reject-bin", BIN, REJECT, 1),
        outside("loss", 1),
      ],
      holdings,
    );
    expect(given(lines, "reject-bin", BIN)).toEqual([[REJECT, { 9: 1 }, { 1: 1 }]]);
    expect(given(lines, "loss")).toEqual([[RED, { 1: 1 }, { 1: 1 }]]);
  });
});

describe("a gain", () => {
  it("is unknown and not heated in an empty holder", () => {
    const holdings = shed({});
    entry("count", [holderLine("lot", LOT, BLUE, 5), outside("difference", -5)], holdings);
    expect(holdings(LOT, BLUE)).toEqual({ grams: 5, O: mapOf({ 0: 5 }), H: mapOf({ 0: 5 }) });
  });

  it("of a count has the lot's own proportion", () => {
    // 4 in the proportion 2 : 1 is 2.67, 1.33 → 3, 1; heated 1.33, 2.67 → 1, 3.
    const holdings = shed({ "1/3": { O: { 1: 2, 2: 1 }, H: { 0: 1, 1: 2 } } });
    entry("count", [holderLine("lot", LOT, BLUE, 4), outside("difference", -4)], holdings);
    expect(holdings(LOT, BLUE)).toEqual({
      grams: 7,
      O: mapOf({ 1: 5, 2: 2 }),
      H: mapOf({ 0: 2, 1: 5 }),
    });
  });

  it("of a step has the proportion of what was taken, and enters before anything goes out", () => {
    const holdings = shed({ "1/3": { O: { 1: 90, 2: 10 }, H: { 0: 100 } } });
    const lines = entry(
      "step",
      [
        holderLine("lot", LOT, BLUE, -100),
        holderLine("lot", OTHER_LOT, RED, 110),
        outside("loss", -10),
      ],
      holdings,
    );
    expect(given(lines, "lot", OTHER_LOT)).toEqual([[RED, { 1: 99, 2: 11 }, { 0: 110 }]]);
    expect(lines.find((line) => line.account === "loss")).toMatchObject({
      materialId: BLUE,
      grams: -10,
      parts: {
        O: [
          [1, -9],
          [2, -1],
        ],
        H: [[0, -10]],
      },
    });
  });
});
