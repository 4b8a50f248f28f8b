/**
 * Resin codes and polymer names.
 *
 * Sources (columns of fixtures/reference/ric_codes.csv and iso1043_terms.csv): ASTM D7611/D7611M by way
 * of the ANSI blog of March 2020 and liquisearch.com's table of resin codes; Decision 97/129/EC by way of
 * published label lists; ISO 1043-1:2011. Rows marked SECONDARY were read in those sources; rows marked
 * MEMORY (ABS, PLA, PA, PC) were not, so they show no more than that the spelling is the usual one.
 */
import { describe, expect, it } from "vitest";
import {
  POLYMERS,
  POLYMER_ANSWERS,
  POLYMER_NAMES,
  UNIDENTIFIED,
  type Polymer,
} from "@/lib/core/plastics";
import { referenceTable } from "../support/reference-table";

const astm = referenceTable("ric_codes").filter((row) => row.scheme === "ASTM D7611");
const eu = referenceTable("ric_codes").filter((row) => row.scheme === "EU 97/129/EC");
const terms = referenceTable("iso1043_terms");
const codeOf = (polymer: Polymer) => POLYMER_NAMES[polymer].resinCode;

describe("resin codes", () => {
  it("are ASTM's seven", () => {
    expect(astm.map((row) => row.code)).toEqual(["1", "2", "3", "4", "5", "6", "7"]);
  });

  it.each(astm.filter((row) => row.code !== "7"))(
    "$code is $name, stored as $iso_1043_1",
    (row) => {
      const found = POLYMERS.filter((polymer) => codeOf(polymer) === Number(row.code));
      expect(found).toEqual([row.iso_1043_1]);
    },
  );

  it("7 is every other resin, and O is among them", () => {
    const seven = POLYMERS.filter((polymer) => codeOf(polymer) === 7);
    expect(seven).toEqual(["ABS", "PLA", "PA", "PC", "O"]);
    expect(astm[6]?.alternative).toBe("O");
  });

  it("1 to 6 agree with Decision 97/129/EC", () => {
    for (const row of eu.filter((one) => Number(one.code) <= 6)) {
      const polymer = POLYMERS.find((one) => codeOf(one) === Number(row.code));
      expect([polymer, polymer && POLYMER_NAMES[polymer].name]).toContain(row.abbreviation);
    }
    expect(eu.filter((one) => Number(one.code) <= 6)).toHaveLength(6);
  });

  it("are shown by the trade's usual name, ASTM's own or its alternative", () => {
    for (const row of astm.slice(0, 6)) {
      const polymer = POLYMERS.find((one) => codeOf(one) === Number(row.code));
      const shown = polymer ? POLYMER_NAMES[polymer].name : "";
      expect([row.abbreviation, row.alternative]).toContain(shown);
    }
  });
});

describe("ISO 1043-1", () => {
  it("has a term for every polymer that is stored, other than O", () => {
    const known = terms.map((row) => row.term);
    for (const polymer of POLYMERS.filter((one) => one !== "O")) expect(known).toContain(polymer);
  });

  it("is not what the two other answers are", () => {
    for (const answer of UNIDENTIFIED) {
      expect(POLYMER_NAMES[answer].resinCode).toBeNull();
      expect(terms.map((row) => row.term)).not.toContain(answer);
    }
    expect(POLYMER_ANSWERS).toEqual([...POLYMERS, ...UNIDENTIFIED]);
  });
});
