import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { oldestFirst, type FreeLot } from "@/lib/production/rules/reserving";

const lot = (number: number, freeGrams: number, colourCode = "blue"): FreeLot => ({
  lotId: `lot-${number}`,
  number,
  colourCode,
  freeGrams,
});
const taken = (picks: { number: number; grams: number }[]) =>
  picks.map(({ number, grams }) => `${number}: ${grams}`);

describe("oldest first", () => {
  it("empties the oldest lot before it touches the next", () => {
    const lots = [lot(3, 400), lot(1, 500), lot(2, 900)];
    const { picks, uncovered } = oldestFirst([{ colourCode: "blue", grams: 1000 }], lots);
    expect(taken(picks)).toEqual(["3: 400", "1: 500", "2: 100"]);
    expect(uncovered).toEqual([]);
  });

  it("passes lots of another colour and lots that have nothing free, and names what is not covered", () => {
    const lots = [lot(1, 0), lot(2, -40), lot(3, 70, "white"), lot(4, 30)];
    const lacking = [
      { colourCode: "blue", grams: 100 },
      { colourCode: "white", grams: 70 },
      { colourCode: "red", grams: 5 },
    ];
    const { picks, uncovered } = oldestFirst(lacking, lots);
    expect(taken(picks)).toEqual(["4: 30", "3: 70"]);
    expect(uncovered).toEqual([
      { colourCode: "blue", grams: 70 },
      { colourCode: "red", grams: 5 },
    ]);
  });

  it("takes nothing where nothing lacks", () => {
    expect(oldestFirst([], [lot(1, 10)])).toEqual({ picks: [], uncovered: [] });
  });

  it("never takes more than is free or lacks, leaves no older gram, and loses none (random)", () => {
    const colours = ["blue", "white", "red"];
    const lots = fc.array(
      fc.record({ colour: fc.nat(2), free: fc.integer({ min: -50, max: 500 }) }),
      { maxLength: 12 },
    );
    const needs = fc.tuple(fc.nat(1200), fc.nat(1200), fc.nat(1200));
    fc.assert(
      fc.property(lots, needs, (list, grams) => {
        const free = list.map(({ colour, free: at }, index) =>
          lot(index + 1, at, colours[colour] ?? "blue"),
        );
        const lacking = colours.map((colourCode, at) => ({ colourCode, grams: grams[at] ?? 0 }));
        const { picks, uncovered } = oldestFirst(lacking, free);
        expect(new Set(picks.map(({ number }) => number)).size).toBe(picks.length);
        for (const { colourCode, grams: needed } of lacking) {
          const own = free.filter((one) => one.colourCode === colourCode);
          const got = picks.filter((pick) => pick.colourCode === colourCode);
          const sum = got.reduce((all, pick) => all + pick.grams, 0);
          const missing = uncovered.find((one) => one.colourCode === colourCode)?.grams ?? 0;
          expect(sum + missing).toBe(needed);
          const there = own.reduce((all, { freeGrams }) => all + Math.max(0, freeGrams), 0);
          expect(sum).toBe(Math.min(needed, there));
          own.forEach((one, at) => {
            const of = got.find((pick) => pick.number === one.number)?.grams ?? 0;
            expect(of).toBeGreaterThanOrEqual(0);
            expect(of).toBeLessThanOrEqual(Math.max(0, one.freeGrams));
            const later = own.slice(at + 1).map(({ number }) => number);
            if (got.some(({ number }) => later.includes(number))) {
              expect(of).toBe(Math.max(0, one.freeGrams));
            }
          });
        }
      }),
    );
  });
});
