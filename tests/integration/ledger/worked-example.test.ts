/** The worked example of the ledger's design (DEVELOPERS.md, "The worked example"), to the gram. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import type { Draft } from "@/lib/ledger/commands/post";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { ledgerOf } from "@/tests/support/ledger-bench";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

let scheme: TestScheme;
beforeEach(() => {
  scheme = newScheme();
});
afterEach(() => scheme.close());

const draft = (kind: Draft["kind"], lines: Draft["lines"]): Draft => ({
  kind,
  occurredAt: NOON,
  subject: `test:${kind}`,
  lines,
});

function example() {
  const ledger = ledgerOf(scheme);
  const a = ledger.origin("point-a");
  const b = ledger.origin("point-b");
  const bagA = ledger.holder("bag", "AAAAAAAA");
  const bagB = ledger.holder("bag", "BBBBBBBB");
  const lot1 = ledger.holder("lot", "LOT00001");
  const lot2 = ledger.holder("lot", "LOT00002");
  const regrindLot = ledger.holder("lot", "LOT00003");
  const run = ledger.holder("run", "RUN00001");
  const bin = ledger.holder("reject-bin", "REJECT-BIN-1");
  const batch = ledger.holder("batch", "BATCH001");
  const whole = ledger.material("blue");
  const flake = ledger.material("blue", "flake");
  const regrind = ledger.material("blue", "flake", "regrind");

  const weighIn = (bag: number, originNo: number, grams: number) =>
    ledger.post(
      draft("weigh-in", [
        {
          account: "source",
          originNo,
          materialId: UNSORTED,
          grams: -grams,
          basis: "unchecked",
          scaleNumber: 1,
          mpeMilligrams: 10_000,
        },
        { account: "bag", holderId: bag, materialId: UNSORTED, grams },
      ]),
    );
  const sort = (bag: number, grams: number) =>
    draft("sort", [
      { account: "bag", holderId: bag, materialId: UNSORTED, grams: -grams },
      { account: "lot", holderId: lot1, materialId: whole, grams },
    ]);
  weighIn(bagA, a, 2160);
  weighIn(bagB, b, 1000);
  const sortA = ledger.post(sort(bagA, 2160));
  ledger.post(sort(bagB, 1000));
  return {
    ledger,
    a,
    b,
    bagA,
    lot1,
    lot2,
    regrindLot,
    run,
    bin,
    batch,
    whole,
    flake,
    regrind,
    sortA,
  };
}

function shredDrawFinish(x: ReturnType<typeof example>): void {
  x.ledger.post(
    draft("step", [
      { account: "lot", holderId: x.lot1, materialId: x.whole, grams: -3160 },
      { account: "lot", holderId: x.lot2, materialId: x.flake, grams: 3151 },
      { account: "loss", cause: "dust", grams: 9 },
    ]),
  );
  x.ledger.post(
    draft("draw", [
      { account: "lot", holderId: x.lot2, materialId: x.flake, grams: -1500 },
      { account: "run", holderId: x.run, materialId: x.flake, grams: 1500 },
    ]),
  );
  x.ledger.post(
    draft("finish", [
      { account: "run", holderId: x.run, materialId: x.flake, grams: -1500 },
      { account: "pieces", holderId: x.batch, materialId: x.flake, grams: 1200 },
      { account: "lot", holderId: x.regrindLot, materialId: x.regrind, grams: 250 },
      { account: "reject-bin", holderId: x.bin, materialId: REJECT, grams: 40 },
      { account: "loss", cause: "spilled", grams: 10 },
    ]),
  );
}

type Row = {
  held: number;
  collected: number;
  accepted: number;
  loss: number;
  difference: number;
  pieces: number;
};

function totals(originNo: number, rowIds: readonly number[]): Row {
  return scheme.db.reader.client
    .prepare(
      `select sum(held) held, sum(collected) collected, sum(accepted) accepted, sum(loss) loss,
         sum(difference) difference, sum(pieces) pieces
       from totals_month where origin_no = ? and row_id in (${rowIds.join(",")})`,
    )
    .get(originNo) as Row;
}

/** Rows of blue HDPE: lids and the regrind of the run. */
function blueRows(): number[] {
  return scheme.db.reader.client
    .prepare(`select id from "rows" where colour_code = 'blue'`)
    .pluck()
    .all() as number[];
}

const resorted = (row: Row): number =>
  row.held - row.collected + row.loss + row.difference + row.pieces;

describe("the worked example", () => {
  it("sorts two bags into one lot", () => {
    const x = example();
    expect(x.ledger.held(x.lot1, x.whole)).toEqual({
      grams: 3160,
      O: { [x.a]: 2160, [x.b]: 1000 },
      H: { 0: 3160 },
    });
  });

  it("splits shredding, draw and finish to the gram", () => {
    const x = example();
    shredDrawFinish(x);
    expect(x.ledger.held(x.lot2, x.flake)).toEqual({
      grams: 1651,
      O: { [x.a]: 1129, [x.b]: 522 },
      H: { 0: 1651 },
    });
    expect(x.ledger.held(x.batch, x.flake)).toEqual({
      grams: 1200,
      O: { [x.a]: 820, [x.b]: 380 },
      H: { 1: 1200 },
    });
    expect(x.ledger.held(x.regrindLot, x.regrind)).toEqual({
      grams: 250,
      O: { [x.a]: 171, [x.b]: 79 },
      H: { 1: 250 },
    });
    expect(x.ledger.held(x.bin, REJECT)).toEqual({
      grams: 40,
      O: { [x.a]: 27, [x.b]: 13 },
      H: { 1: 40 },
    });
    const dust = scheme.db.reader.client
      .prepare(
        `select p.key, p.grams from lines l join line_parts p using (entry_id, seq)
         where l.cause = 'dust' and p.dim = 'O' order by p.key`,
      )
      .raw()
      .all();
    expect(dust).toEqual([
      [x.a, 6],
      [x.b, 3],
    ]);
    const spilled = scheme.db.reader.client
      .prepare(
        `select p.key, p.grams from lines l join line_parts p using (entry_id, seq)
         where l.cause = 'spilled' and p.dim = 'O' order by p.key`,
      )
      .raw()
      .all();
    expect(spilled).toEqual([
      [x.a, 7],
      [x.b, 3],
    ]);
  });

  it("closes the report's rows", () => {
    const x = example();
    shredDrawFinish(x);
    const blue = totals(x.a, blueRows());
    expect(blue).toMatchObject({ held: 1300, accepted: 2160, loss: 13, pieces: 820 });
    expect(resorted(blue)).toBe(2133);
    expect(totals(x.a, [REJECT]).held).toBe(27);
    expect(totals(x.a, [UNSORTED]).collected).toBe(2160);
    const shed = scheme.db.reader.client
      .prepare("select sum(held) from totals_month")
      .pluck()
      .get();
    expect(shed).toBe(1941);
  });

  it("corrects the sort of A while the lot is empty: one act, 60 g settled", () => {
    const x = example();
    shredDrawFinish(x);
    const act = x.ledger.correct(
      x.sortA.actId,
      draft("sort", [
        { account: "bag", holderId: x.bagA, materialId: UNSORTED, grams: -2160 },
        { account: "lot", holderId: x.lot1, materialId: x.whole, grams: 2100 },
        { account: "reject-bin", holderId: x.bin, materialId: REJECT, grams: 60 },
      ]),
    );
    expect(act.entryIds).toHaveLength(3);
    const settling = scheme.db.reader.client
      .prepare("select account, grams from lines where entry_id = ? order by seq")
      .raw()
      .all(act.entryIds[2]);
    expect(settling).toEqual([
      ["difference", -60],
      ["lot", 60],
    ]);
    expect(x.ledger.held(x.lot1, x.whole).grams).toBe(0);
    expect(x.ledger.held(x.bin, REJECT).grams).toBe(100);
    const blueA = totals(x.a, blueRows());
    expect(blueA).toMatchObject({ held: 1300, difference: -60, loss: 13, pieces: 820 });
    expect(resorted(blueA)).toBe(2073);
    const all = scheme.db.reader.client
      .prepare("select sum(accepted) accepted, sum(held) held from totals_month")
      .get();
    expect(all).toEqual({ accepted: 3100, held: 2001 });
  });

  it("refuses a second reversal of the same entry", () => {
    const x = example();
    x.ledger.reverse(x.sortA.actId);
    expect(() => x.ledger.reverse(x.sortA.actId)).toThrow(new AppError("undone-already"));
    const line =
      "insert into lines (entry_id, seq, account, holder_id, material_id, grams, after) values";
    const client = scheme.db.writer.client;
    const again = client.transaction(() => {
      const id = Number(client.prepare("select max(id) + 1 from entries").pluck().get());
      client.prepare(`${line} (?, 1, 'bag', ?, 1, 5, 5)`).run(id, x.bagA);
      client.prepare(`${line} (?, 2, 'lot', ?, ?, -5, 0)`).run(id, x.lot1, x.whole);
      for (const [seq, grams] of [
        [1, 5],
        [2, -5],
      ] as const) {
        for (const dim of ["O", "H"]) {
          client.prepare("insert into line_parts values (?, ?, ?, 0, ?)").run(id, seq, dim, grams);
        }
      }
      client
        .prepare(
          `insert into entries (id, act_id, kind, rule_version, occurred_at, booked_day, recorded_at, done_by,
             sent_by, subject, reverses, line_count, part_count, prev_hash, hash)
           values (?, ?, 'reversal', 1, 0, '2026-05-06', 0, 'x', 'x', 'x', ?, 2, 4, (select hash from entries where id = ?), 'h')`,
        )
        .run(id, id, x.sortA.actId, id - 1);
    });
    expect(() => again()).toThrow(/UNIQUE constraint failed: entries.reverses/);
  });
});
