import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { filterQuery } from "@/components/stock/filter-query";
import { POLYMER_ANSWERS } from "@/lib/core/plastics";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { layOutShelf } from "@/lib/stock/rules/shelf";
import { plateKg, wellWords } from "@/lib/stock/rules/well-words";

const colour = (code: string) => ({ code, name: code, hex: "#123456", look: "solid" as const });

describe("the shelf", () => {
  it("keeps its four usual polymers, adds what is held, and leaves empty colours out", () => {
    const shelf = layOutShelf({
      cells: [
        { polymer: "PVC", colourCode: "grey", grams: 40, reservedGrams: 0, lots: 1 },
        { polymer: "PP", colourCode: "blue", grams: 900, reservedGrams: 200, lots: 2 },
      ],
      colours: [colour("blue"), colour("red"), colour("grey")],
    });
    expect(shelf.rows.map((row) => row.polymer)).toEqual(["PE-HD", "PP", "PE-LD", "PS", "PVC"]);
    expect(shelf.columns.map((column) => column.code)).toEqual(["blue", "grey"]);
    expect([shelf.grams, shelf.reservedGrams, shelf.freeGrams, shelf.fullestGrams]).toEqual([
      940, 200, 740, 900,
    ]);
  });

  it("never leaves anything out, whatever is held", () => {
    const cell = fc.record({
      polymer: fc.constantFrom(...POLYMER_ANSWERS),
      colourCode: fc.constantFrom("blue", "red", "old-one"),
      grams: fc.integer({ min: 1, max: 100_000 }),
      reservedGrams: fc.constant(0),
      lots: fc.constant(1),
    });
    const cells = fc.uniqueArray(cell, { selector: (one) => one.polymer + one.colourCode });
    fc.assert(
      fc.property(cells, (held) => {
        const shelf = layOutShelf({ cells: held, colours: [colour("blue"), colour("red")] });
        const sum = held.reduce((total, one) => total + one.grams, 0);
        expect(shelf.grams).toBe(sum);
        expect(shelf.rows.reduce((total, row) => total + row.grams, 0)).toBe(sum);
        expect(shelf.rows.flatMap((row) => row.cells.filter(Boolean))).toHaveLength(held.length);
      }),
    );
  });
});

describe("words of the stock", () => {
  it("fit a well's plate and never call something nothing", () => {
    expect(plateKg(18_580)).toBe("18.58");
    expect(plateKg(3)).toBe("<0.01");
    expect(plateKg(123_440)).toBe("123.4");
    expect(plateKg(1_204_000)).toBe("1\u2009204");
    expect(plateKg(99_994)).toBe("99.99");
  });

  it("are read aloud in full", () => {
    expect(wellWords("PE-HD", "Blue", { grams: 5790, reservedGrams: 1200 })).toBe(
      "HDPE, Blue: 5.790 kg, 1.200 kg of it reserved",
    );
    expect(wellWords("PS", "Red", null)).toBe("PS, Red: nothing");
  });

  it("name a material", () => {
    expect(pileName("Blue", "PE-HD")).toBe("Blue HDPE");
    expect(pileName("Black", "not-sure")).toBe("Black, not sure");
    expect(pileName("Grey", "O")).toBe("Grey other plastic");
    expect(pileDetail({ kind: "lids", form: "whole", wash: "as-received" })).toBe(
      "lids, whole, as received",
    );
  });

  it("make an address of what is filtered", () => {
    expect(filterQuery({})).toBe("");
    expect(filterQuery({ kind: "lids", polymer: "PP", colour: "blue" })).toBe(
      "?polymer=PP&colour=blue&kind=lids",
    );
  });
});
