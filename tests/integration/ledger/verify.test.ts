/** The verifier names the first bad entry, whatever was tampered with behind the triggers' back. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { Draft } from "@/lib/ledger/commands/post";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { ledgerOf } from "@/tests/support/ledger-bench";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
  const ledger = ledgerOf(scheme);
  const origin = ledger.origin("point-a");
  const bag = ledger.holder("bag", "AAAAAAAA");
  const lot = ledger.holder("lot", "LOT00001");
  const bin = ledger.holder("reject-bin", "REJECT-BIN-1");
  const material = ledger.material("blue");
  const draft = (kind: Draft["kind"], lines: Draft["lines"]): Draft => ({
    kind,
    occurredAt: NOON,
    subject: "test",
    lines,
  });
  ledger.post(
    draft("weigh-in", [
      {
        account: "source",
        originNo: origin,
        materialId: UNSORTED,
        grams: -2000,
        basis: "unchecked",
        scaleNumber: 1,
        mpeMilligrams: 5000,
      },
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: 2000 },
    ]),
  );
  const sort = ledger.post(
    draft("sort", [
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: -2000 },
      {
        account: "lot",
        holderId: lot,
        materialId: material,
        grams: 1900,
        basis: "unchecked",
        scaleNumber: 1,
        mpeMilligrams: 5000,
      },
      { account: "reject-bin", holderId: bin, materialId: REJECT, grams: 90 },
      { account: "difference", grams: 10 },
    ]),
  );
  ledger.post(
    draft("draw", [
      { account: "lot", holderId: lot, materialId: material, grams: -1000 },
      {
        account: "run",
        holderId: ledger.holder("run", "RUN00001"),
        materialId: material,
        grams: 1000,
      },
    ]),
  );
  ledger.correct(
    sort.actId,
    draft("sort", [
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: -2000 },
      { account: "lot", holderId: lot, materialId: material, grams: 900 },
      { account: "reject-bin", holderId: bin, materialId: REJECT, grams: 1100 },
    ]),
  );
});
afterEach(() => scheme.close());

/** Changes the database as somebody with the file and a tool could: without its triggers. */
function tamper(sql: string): void {
  const client = scheme.db.writer.client;
  for (const name of client
    .prepare("select name from sqlite_master where type = 'trigger'")
    .pluck()
    .all() as string[]) {
    client.exec(`drop trigger "${name}"`);
  }
  client.exec(sql);
}

const verify = () => verifyLedger(scheme.db.reader);

describe("verifyLedger", () => {
  it("finds a good ledger good", () => {
    expect(verify()).toMatchObject({
      ok: true,
      badEntry: null,
      problem: null,
      entries: 6,
      lines: 17,
    });
  });

  it.each([
    [
      "a changed amount",
      "update lines set grams = -2001 where entry_id = 1 and seq = 1",
      1,
      /hash/,
    ],
    ["a changed person", "update entries set done_by = 'somebody' where id = 2", 2, /hash/],
    ["a changed day", "update entries set booked_day = '2026-05-07' where id = 3", 3, /hash/],
    ["a removed entry", "delete from entries where id = 3", 4, /entry 3 is missing/],
    [
      "a changed part",
      "update line_parts set grams = grams + 1 where entry_id = 2 and seq = 2 and dim = 'H'",
      2,
      /hash/,
    ],
    ["a renamed material", `update "rows" set colour_code = 'red' where id = 3`, 2, /hash/],
    ["another point", "update origins set type = 'collector' where no = 1", 1, /hash/],
    ["a changed hash", "update entries set hash = 'x' where id = 2", 2, /hash/],
    [
      "a changed balance",
      "update balances set grams = grams + 1 where holder_id = 2",
      null,
      /holder 2/,
    ],
    [
      "a changed part of a balance",
      "update parts set key = 0 where holder_id = 3 and dim = 'O'",
      null,
      /holder 3/,
    ],
    [
      "a changed day's total",
      "update totals_day set accepted = accepted + 5 where accepted > 0",
      null,
      /totals_day/,
    ],
    ["a lost month's total", "delete from totals_month where row_id = 2", null, /totals_month/],
    ["a changed scale's total", "update totals_scale set mpe_mg = 1", null, /totals_scale/],
    [
      "a late line",
      "insert into lines (entry_id, seq, account, material_id, grams) values (7, 1, 'loss', 1, 5)",
      null,
      /never sealed/,
    ],
  ])("names %s", (_, sql, badEntry, problem) => {
    tamper(sql);
    const found = verify();
    expect(found.ok).toBe(false);
    expect(found.badEntry).toBe(badEntry);
    expect(found.problem).toMatch(problem);
  });

  it("finds a rewritten tail only by a head that was noted outside", () => {
    const good = verify();
    expect(
      verifyLedger(scheme.db.reader, { entryId: good.headEntry, hash: good.headHash }).ok,
    ).toBe(true);
    expect(
      verifyLedger(scheme.db.reader, { entryId: good.headEntry, hash: "0".repeat(64) }),
    ).toMatchObject({
      ok: false,
      badEntry: good.headEntry,
    });
    expect(verifyLedger(scheme.db.reader, { entryId: 99, hash: good.headHash })).toMatchObject({
      ok: false,
      problem: "entry 99, noted outside the database, is not there",
    });
  });
});
