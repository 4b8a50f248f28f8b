/** The database itself refuses to change the ledger: every trigger and CHECK is seen to refuse. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { UNSORTED } from "@/lib/ledger/terms";
import { ledgerOf } from "@/tests/support/ledger-bench";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
  const ledger = ledgerOf(scheme);
  const origin = ledger.origin("point-a");
  const bag = ledger.holder("bag", "AAAAAAAA");
  ledger.post({
    kind: "weigh-in",
    occurredAt: NOON,
    subject: "test",
    lines: [
      { account: "source", originNo: origin, materialId: UNSORTED, grams: -2000 },
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: 2000 },
    ],
  });
  ledger.material("blue");
});
afterEach(() => scheme.close());

const exec = (sql: string) => () => scheme.db.writer.client.exec(sql);

const ENTRY = (
  values: Partial<Record<"id" | "lines" | "parts" | "prev" | "day" | "kind" | "reverses", string>>,
) =>
  `insert into entries (id, act_id, kind, rule_version, occurred_at, booked_day, recorded_at, done_by, sent_by,
     subject, reverses, line_count, part_count, prev_hash, hash)
   values (${values.id ?? "2"}, 2, '${values.kind ?? "count"}', 1, 0, '${values.day ?? "2026-05-06"}', 0, 'x', 'x', 'x', ${values.reverses ?? "null"},
     ${values.lines ?? "2"}, ${values.parts ?? "4"}, ${values.prev ?? "(select hash from entries where id = 1)"}, 'h');`;
const LINES = (a: number, b: number) =>
  `insert into lines (entry_id, seq, account, holder_id, material_id, grams, after) values (2, 1, 'bag', 1, 1, ${a}, 1);
   insert into lines (entry_id, seq, account, material_id, grams) values (2, 2, 'difference', 1, ${b});`;
const PARTS = (a: number, b: number) =>
  `insert into line_parts values (2, 1, 'O', 0, ${a}), (2, 1, 'H', 0, ${a}), (2, 2, 'O', 0, ${b}), (2, 2, 'H', 0, ${b});`;
const rolledBack = (sql: string) => () => {
  scheme.db.writer.client.exec("begin");
  try {
    scheme.db.writer.client.exec(sql);
  } finally {
    if (scheme.db.writer.client.inTransaction) scheme.db.writer.client.exec("rollback");
  }
};

describe("append-only", () => {
  it.each([
    ["update of an entry", "update entries set subject = 'y'", /never changed/],
    ["delete of an entry", "delete from entries", /never deleted/],
    [
      "replace of an entry",
      "insert or replace into entries select * from entries",
      /never deleted|no gaps/,
    ],
    [
      "upsert of an entry",
      "insert into entries select * from entries where true on conflict do update set subject = 'y'",
      /no gaps|never changed/,
    ],
    ["update of a line", "update lines set grams = 1 where seq = 1", /never changed/],
    ["delete of a line", "delete from lines", /never deleted/],
    [
      "replace of a line",
      "insert or replace into lines select * from lines where seq = 1",
      /next entry|never deleted/,
    ],
    [
      "upsert of a line",
      "insert into lines select * from lines where true on conflict do update set grams = 7",
      /next entry|never changed/,
    ],
    ["update of a part", "update line_parts set grams = 1", /never changed/],
    ["delete of a part", "delete from line_parts", /never deleted/],
    [
      "replace of a part",
      "insert or replace into line_parts select * from line_parts",
      /next entry|never deleted/,
    ],
    ["update of a row", `update "rows" set colour_code = 'x' where id = 3`, /never changed/],
    ["delete of a row", `delete from "rows"`, /never deleted/],
    ["replace of a row", `insert or replace into "rows" select * from "rows"`, /never deleted/],
    ["update of a material", "update materials set form = 'flake' where id = 3", /never changed/],
    ["delete of a material", "delete from materials", /never deleted/],
    ["update of an origin", "update origins set type = 'bought'", /never changed/],
    ["delete of an origin", "delete from origins", /never deleted/],
    ["update of a holder", "update holders set code = 'x'", /never changed/],
    ["delete of a holder", "delete from holders", /never deleted/],
    [
      "upsert of a holder",
      "insert into holders select * from holders where true on conflict do update set code = 'x'",
      /never changed/,
    ],
    [
      "a late line",
      "insert into lines (entry_id, seq, account, material_id, grams) values (1, 9, 'loss', 1, 1)",
      /next entry/,
    ],
    [
      "a line further on",
      "insert into lines (entry_id, seq, account, material_id, grams) values (9, 1, 'loss', 1, 1)",
      /next entry/,
    ],
    ["a late part", "insert into line_parts values (1, 1, 'O', 5, 1)", /next entry/],
    ["a moved time zone", "update scheme set time_zone = 'Asia/Tokyo'", /time zone is fixed/],
    ["another first day", "update scheme set first_day = '2020-01-01'", /time zone is fixed/],
    [
      "a receipt changed",
      "insert into receipts values ('r','s','e','b','a',1); update receipts set answer = 'z'",
      /kept as they were/,
    ],
  ])("refuses %s", (_, sql, message) => {
    expect(rolledBack(sql)).toThrow(message);
  });
});

describe("sealing", () => {
  it("takes a right entry", () => {
    expect(rolledBack(LINES(5, -5) + PARTS(5, -5) + ENTRY({}))).not.toThrow();
  });
  it.each([
    ["lines that do not sum to zero", LINES(5, -4) + PARTS(5, -4) + ENTRY({}), /sum to zero/],
    [
      "a wrong count of lines",
      LINES(5, -5) + PARTS(5, -5) + ENTRY({ lines: "3" }),
      /count of lines/,
    ],
    [
      "a wrong count of parts",
      LINES(5, -5) + PARTS(5, -5) + ENTRY({ parts: "5" }),
      /count of parts/,
    ],
    [
      "parts that differ from their line",
      LINES(5, -5) + PARTS(4, -5) + ENTRY({}),
      /equals its parts/,
    ],
    [
      "a part without its line",
      LINES(5, -5) +
        PARTS(5, -5) +
        "insert into line_parts values (2, 7, 'O', 0, 1);" +
        ENTRY({ parts: "5" }),
      /without its line/,
    ],
    ["a gap", ENTRY({ id: "3" }), /no gaps/],
    [
      "another hash before",
      LINES(5, -5) + PARTS(5, -5) + ENTRY({ prev: "'x'" }),
      /hash of the one before/,
    ],
    ["no lines", ENTRY({ lines: "0", parts: "0" }), /sum to zero|count of lines/],
    [
      "a closed month",
      "insert into periods values ('2026-05', 1, 'h', '{}', 'x');" +
        LINES(5, -5) +
        PARTS(5, -5) +
        ENTRY({}),
      /month is closed/,
    ],
    [
      "an earlier month than a closed one",
      "insert into periods values ('2026-05', 1, 'h', '{}', 'x');" +
        LINES(5, -5) +
        PARTS(5, -5) +
        ENTRY({ day: "2026-03-01" }),
      /month is closed/,
    ],
    [
      "months closed out of order",
      "insert into periods values ('2026-05', 1, 'h', '{}', 'x'), ('2026-04', 1, 'h', '{}', 'x')",
      /close in order/,
    ],
    [
      "a reversal that names nothing",
      LINES(5, -5) + PARTS(5, -5) + ENTRY({ kind: "reversal" }),
      /entries_reversal/,
    ],
  ])("refuses %s", (_, sql, message) => {
    expect(rolledBack(sql)).toThrow(message);
  });
});

describe("checked columns", () => {
  it.each([
    ["half a gram in a balance", "update balances set grams = 0.5", /balances_whole_numbers/],
    ["a balance below zero", "update balances set grams = -1", /balances_not_negative/],
    [
      "text for grams",
      "insert into lines (entry_id, seq, account, material_id, grams) values (2, 1, 'loss', 1, 'abc')",
      /whole_numbers/,
    ],
    [
      "a fraction of a gram",
      "insert into lines (entry_id, seq, account, material_id, grams) values (2, 1, 'loss', 1, 1.5)",
      /whole_numbers/,
    ],
    [
      "a line of nothing",
      "insert into lines (entry_id, seq, account, material_id, grams) values (2, 1, 'loss', 1, 0)",
      /lines_not_zero/,
    ],
    [
      "a holder's account without holder",
      "insert into lines (entry_id, seq, account, material_id, grams) values (2, 1, 'lot', 1, 1)",
      /lines_holder/,
    ],
    [
      "an unknown account",
      "insert into lines (entry_id, seq, account, material_id, grams) values (2, 1, 'gift', 1, 1)",
      /lines_account/,
    ],
    ["four times heated", "insert into line_parts values (2, 1, 'H', 4, 1)", /line_parts_key/],
    ["a part at zero", "insert into parts values (1, 1, 'O', 0, 0)", /parts_not_negative/],
    ["an unknown holder", "insert into balances values (99, 1, 1)", /FOREIGN KEY/],
  ])("refuses %s", (_, sql, message) => {
    expect(exec(sql)).toThrow(message);
  });

  it("refuses every write on the reader", () => {
    expect(() => scheme.db.reader.client.exec("update scheme set name = 'x'")).toThrow(/readonly/);
  });
});
