/**
 * CSV as the program writes it.
 *
 * Sources: RFC 4180 section 2, rules 1 to 7 (read in the copies at rfcinfo.com/rfc-4180/2 and in
 * csv4180's README); OWASP www-community, pages/attacks/CSV_Injection.md (no cell may begin with
 * = + - @ TAB CR or LF, its example `=1+2";=1+2`); OWASP ASVS 1.2.10, which adds NUL.
 */
import fc from "fast-check";
import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { csvNumber, csvText, type CsvCell } from "@/lib/core/csv";

describe("RFC 4180", () => {
  it("rule 1 and 2: one record a line, each ended by CRLF, the last one too", () => {
    expect(
      csvText([
        ["aaa", "bbb", "ccc"],
        ["zzz", "yyy", "xxx"],
      ]),
    ).toBe("aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n");
  });

  it("rule 4: spaces are part of the field", () => {
    const text = csvText([[" a ", "b c"]]);
    expect(Papa.parse(text.trimEnd()).data).toEqual([[" a ", "b c"]]);
  });

  it("rule 5 and 6: a field with a comma, a quote or a line break is quoted, others need not be", () => {
    expect(csvText([["aaa", "b\r\nbb", "ccc"]])).toBe('aaa,"b\r\nbb",ccc\r\n');
    expect(csvText([["a,b", "plain"]])).toBe('"a,b",plain\r\n');
  });

  it("rule 7: a quote inside is doubled (the RFC's example)", () => {
    expect(csvText([["aaa", 'b"bb', "ccc"]])).toBe('aaa,"b""bb",ccc\r\n');
  });

  it("has no byte order mark and is UTF-8 as it stands", () => {
    expect(csvText([["Ålesund – 3 μm"]])).toBe("Ålesund – 3 μm\r\n");
  });

  it("is read back as it was written, whatever the cells", () => {
    const cell: fc.Arbitrary<CsvCell> = fc.oneof(
      fc.string({ unit: "grapheme" }),
      fc.string({
        unit: fc.constantFrom('"', ",", "\r", "\n", " ", "a", ";", "'", "=", "\t", "-"),
      }),
      fc.integer(),
      fc.constant(null),
      fc.integer({ min: -99999, max: 99999 }).map((value) => csvNumber(`${value}.125`)),
    );
    const written = (value: CsvCell): string => {
      if (value === null) return "";
      if (typeof value === "object") return value.number;
      return typeof value === "string" && /^[=+\-@\t\r\n\0]/.test(value)
        ? `'${value}`
        : String(value);
    };
    const table = fc.integer({ min: 2, max: 6 }).chain((width) =>
      fc.array(fc.array(cell, { minLength: width, maxLength: width }), {
        minLength: 1,
        maxLength: 8,
      }),
    );
    fc.assert(
      fc.property(table, (rows) => {
        const text = csvText(rows);
        expect(text.endsWith("\r\n")).toBe(true);
        // Both settings are told: guessing them is a reader's weakness, not the file's.
        const read = Papa.parse<string[]>(text.slice(0, -2), { delimiter: ",", newline: "\r\n" });
        expect(read.errors).toEqual([]);
        expect(read.data).toEqual(rows.map((row) => row.map(written)));
      }),
      { numRuns: 1000 },
    );
  });
});

describe("formula cells (OWASP, CSV Injection)", () => {
  it.each(["=", "+", "-", "@", "\t", "\r", "\n", "\0"])(
    "a text that begins with %j begins with an apostrophe",
    (start) => {
      const [[cell] = []] = Papa.parse<string[]>(csvText([[`${start}1+2`]]).slice(0, -2), {
        delimiter: ",",
        newline: "\r\n",
      }).data;
      expect(cell).toBe(`'${start}1+2`);
    },
  );

  it("writes OWASP's example as OWASP does", () => {
    expect(csvText([['=1+2";=1+2']])).toBe('"\'=1+2"";=1+2"\r\n');
  });

  it("leaves such a sign alone inside a text, and before a number that is a number", () => {
    expect(csvText([["a=b", "3-4", csvNumber("-3.5"), -7]])).toBe("a=b,3-4,-3.5,-7\r\n");
  });

  it("leaves no cell that a spreadsheet would run, whatever is typed", () => {
    fc.assert(
      fc.property(
        fc.array(fc.string({ unit: "grapheme" }), { minLength: 1, maxLength: 5 }),
        (row) => {
          const [cells = []] = Papa.parse<string[]>(csvText([row]).slice(0, -2), {
            delimiter: ",",
            newline: "\r\n",
          }).data;
          for (const cell of cells) expect(cell).not.toMatch(/^[=+\-@\t\r\n\0]/);
        },
      ),
    );
  });
});
