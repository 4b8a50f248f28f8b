/**
 * ISO 7064 MOD 37,36, the check character of every code in the program.
 *
 * Sources of the examples (fixtures/reference/check_digit_examples.csv, column source): python-stdnum at
 * 006192e, stdnum/grid.py (the Global Release Identifier uses MOD 37,36), and a public Java test of the
 * system. The other systems of that table are not used by the program.
 */
import { describe, expect, it } from "vitest";
import { CODE_SYMBOLS, checkCharacter3736, readCode } from "@/lib/core/bag-code";
import { referenceTable } from "../support/reference-table";

const rows = referenceTable("check_digit_examples").filter((row) =>
  row.system?.startsWith("MOD 37,36"),
);
const valid = rows.filter((row) => row.check_character !== "INVALID");

describe("ISO 7064 MOD 37,36", () => {
  it("has its published examples at hand", () => {
    expect(valid.length).toBeGreaterThanOrEqual(3);
    expect(rows.length - valid.length).toBeGreaterThanOrEqual(1);
    expect(rows.every((row) => row.mark === "READ")).toBe(true);
  });

  it.each(valid)("$payload_or_full has the check character $check_character", (row) => {
    expect(checkCharacter3736(row.payload_or_full ?? "")).toBe(row.check_character);
  });

  it("refuses the published invalid identifier", () => {
    const plain = (
      rows.find((row) => row.check_character === "INVALID")?.payload_or_full ?? ""
    ).replaceAll("-", "");
    expect(plain).toHaveLength(18);
    expect(checkCharacter3736(plain.slice(0, -1))).not.toBe(plain.slice(-1));
  });

  /**
   * The system as its own definition says it, step by step and apart from the program's code: the
   * adjusted remainders P_(j+1) = (S_j || M) × 2 mod (M + 1) with M = 36, P_1 = M, and the check character
   * is the one that makes (S_n || M) + a_1 ≡ 1 (mod M). Source: the recursion as given for hybrid systems
   * in python-stdnum 006192e, stdnum/iso7064/mod_37_36.py.
   */
  it("agrees with the definition's congruence for every code of seven symbols tried", () => {
    const symbols = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ";
    const M = 36;
    const congruent = (text: string) => {
      let check = M / 2;
      for (const symbol of text) {
        check = (((check || M) * 2) % (M + 1)) + symbols.indexOf(symbol);
        check %= M;
      }
      return check === 1;
    };
    let seed = 20261201;
    for (let round = 0; round < 5000; round += 1) {
      let text = "";
      for (let place = 0; place < 7; place += 1) {
        seed = (Math.imul(seed, 1103515245) + 12345) >>> 0;
        text += CODE_SYMBOLS[(seed >>> 16) % 32] ?? "";
      }
      expect(congruent(text + checkCharacter3736(text)), text).toBe(true);
    }
  });

  it("uses the alphabet of Crockford's base 32, without I, L, O and U", () => {
    // Source: the alphabet as published with the examples at hexdocs.pm/base32_crockford.
    expect(CODE_SYMBOLS).toBe("0123456789ABCDEFGHJKMNPQRSTVWXYZ");
    expect(readCode("IIIIIII")).toEqual(readCode("1111111"));
    expect(readCode("ooooooo")).toEqual(readCode("0000000"));
  });
});
