import { describe, expect, it } from "vitest";
import { csvNumber, csvText } from "@/lib/core/csv";

describe("csvText", () => {
  it("ends every record with CRLF, and is empty for none", () => {
    expect(csvText([])).toBe("");
    expect(csvText([["point", "kg"]])).toBe("point,kg\r\n");
    expect(
      csvText([
        ["a", 1],
        [null, -2],
      ]),
    ).toBe("a,1\r\n,-2\r\n");
  });

  it("leaves numbers as numbers, a minus sign too", () => {
    expect(csvText([[csvNumber("-0.060"), -5, csvNumber("2.160")]])).toBe("-0.060,-5,2.160\r\n");
  });

  it("defuses a text that looks like a number with a sign, because it is text", () => {
    expect(csvText([["-5", "+44 1632"]])).toBe("'-5,'+44 1632\r\n");
  });

  it.each(["1,5", "=1", "1e3", "", " 1", "--1", "1.", ".5", "Infinity", "1\n"])(
    'does not take "%s" for a plain number',
    (text) => {
      expect(() => csvNumber(text)).toThrow(RangeError);
    },
  );
});
