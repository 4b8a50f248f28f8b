import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { heldBy } from "@/lib/ledger/queries/entries";
import { REJECT, UNSORTED } from "@/lib/ledger/terms";
import { closeSorting } from "@/lib/sorting/commands/close";
import { newShed, noonOf, onPan, sorting, type Shed } from "../../support/shed";

let shed: Shed;
beforeEach(() => {
  shed = newShed();
});
afterEach(() => shed.close());

const count = (table: string): number =>
  shed.db.reader.client.prepare(`select count(*) from ${table}`).pluck().get() as number;
const all = (sql: string, ...values: unknown[]): unknown[] =>
  shed.db.reader.client.prepare(sql).all(...values);

describe("closing a sorting", () => {
  it("splits the bag of the example: piles to lots, reject to the bin, 8 g to difference", () => {
    const bag = shed.weigh(2160);
    const receipt = closeSorting(
      shed.ctx("volunteer"),
      sorting(shed, bag, {
        piles: [
          { colour: "blue", grams: 1295 },
          { colour: "light-blue", grams: 520 },
          { colour: "white", grams: 230 },
        ],
        rejects: [{ reason: "stuck", grams: 105 }],
      }),
    );
    expect(receipt).toMatchObject({
      netGrams: 2160,
      acceptedGrams: 2045,
      rejectedGrams: 105,
      differenceGrams: 10,
      cause: null,
    });
    expect(
      receipt.lots.map(({ number, opened, grams, heldGrams }) => [
        number,
        opened,
        grams,
        heldGrams,
      ]),
    ).toEqual([
      [1, true, 1295, 1295],
      [2, true, 520, 520],
      [3, true, 230, 230],
    ]);
    const lines = all(
      "select account, grams, basis, scale_id as scale, mpe_mg as mpe from lines where entry_id = (select max(id) from entries) order by seq",
    );
    expect(lines).toEqual([
      { account: "bag", grams: -2160, basis: null, scale: null, mpe: null },
      { account: "lot", grams: 1295, basis: "unchecked", scale: 1, mpe: 5000 },
      { account: "lot", grams: 520, basis: "unchecked", scale: 1, mpe: 5000 },
      { account: "lot", grams: 230, basis: "unchecked", scale: 1, mpe: 5000 },
      { account: "reject-bin", grams: 105, basis: "unchecked", scale: 1, mpe: 5000 },
      { account: "difference", grams: 10, basis: null, scale: null, mpe: null },
    ]);
    expect(all("select state from bags where id = ?", bag.bagId)).toEqual([{ state: "sorted" }]);
    expect(count("fractions")).toBe(4);
  });

  it("leaves one audit row and a balanced entry, and counts as accepted and rejected on its day", () => {
    const bag = shed.weigh(1000, { at: noonOf("2026-05-04") });
    const before = count("audit_events");
    closeSorting(
      shed.ctx("volunteer"),
      sorting(shed, bag, { piles: [{ grams: 900 }], rejects: [{ grams: 100 }] }),
    );
    expect(count("audit_events")).toBe(before + 1);
    expect(
      all("select action, subject_kind as kind from audit_events order by id desc limit 1"),
    ).toEqual([{ action: "sorting.close", kind: "sorting" }]);
    expect(
      all("select sum(grams) as sum from lines where entry_id = (select max(id) from entries)"),
    ).toEqual([{ sum: 0 }]);
    expect(
      all(
        "select day, sum(accepted) as accepted, sum(rejected) as rejected from totals_day group by day order by day",
      ),
    ).toEqual([
      { day: "2026-05-04", accepted: 0, rejected: 0 },
      { day: "2026-05-06", accepted: 900, rejected: 100 },
    ]);
  });

  it("puts piles of one material into one lot, and a second bag into the same", () => {
    const [a, b] = [shed.weigh(1000), shed.weigh(500)];
    const first = closeSorting(
      shed.ctx("volunteer"),
      sorting(shed, a, { piles: [{ grams: 600 }, { grams: 400 }] }),
    );
    const second = closeSorting(shed.ctx("lead"), sorting(shed, b, { piles: [{ grams: 500 }] }));
    expect(first.lots).toEqual([{ number: 1, opened: true, grams: 1000, heldGrams: 1000 }]);
    expect(second.lots).toEqual([{ number: 1, opened: false, grams: 500, heldGrams: 1500 }]);
    expect(count("lots")).toBe(1);
    expect(all("select kind from labels where kind = 'lot'")).toHaveLength(1);
  });

  it("answers the same request twice with one effect, and refuses other content under its id", () => {
    const bag = shed.weigh(1000);
    const input = sorting(shed, bag, { piles: [{ grams: 1000 }] });
    const ctx = shed.ctx("volunteer", undefined, input);
    const receipt = closeSorting(ctx, input);
    expect(closeSorting(ctx, input)).toEqual(receipt);
    expect(count("sorting_sessions")).toBe(1);
    const other = { ...input, piles: [{ ...input.piles[0]!, reading: onPan(995) }] };
    expect(() => closeSorting(shed.ctx("volunteer", undefined, other), other)).toThrow(
      "request-id-reused",
    );
  });

  it("is refused for a donor and for nobody", () => {
    const bag = shed.weigh(1000);
    const input = sorting(shed, bag, { piles: [{ grams: 1000 }] });
    expect(() => closeSorting(shed.ctx("donor"), input)).toThrow("forbidden");
    expect(() => closeSorting(shed.ctx("nobody"), input)).toThrow("signed-out");
    expect(count("sorting_sessions")).toBe(0);
  });

  it("is refused for a bag that is sorted, not weighed, or unknown", () => {
    const bag = shed.weigh(1000);
    closeSorting(shed.ctx("volunteer"), sorting(shed, bag, { piles: [{ grams: 1000 }] }));
    const again = sorting(shed, bag, { piles: [{ grams: 1000 }] });
    expect(() => closeSorting(shed.ctx("volunteer"), again)).toThrow("bag-already-sorted");

    const printed = shed.weigh(800);
    shed.db.writer.client
      .prepare("update bags set state = 'picked-up' where id = ?")
      .run(printed.bagId);
    const early = sorting(shed, printed, { piles: [{ grams: 800 }] });
    expect(() => closeSorting(shed.ctx("volunteer"), early)).toThrow("bag-not-weighed");

    const foreign = { ...again, requestId: newId(), codes: ["00000002"] as typeof again.codes };
    expect(() => closeSorting(shed.ctx("volunteer"), foreign)).toThrow("unknown-code");
  });
});

describe("the sum of the piles", () => {
  it("asks for a cause beyond the tolerance, then posts a loss", () => {
    const bag = shed.weigh(2000);
    const piles = [{ grams: 1900 }];
    const ask = sorting(shed, bag, { piles });
    expect(() => closeSorting(shed.ctx("volunteer"), ask)).toThrow("sum-beyond-tolerance");
    expect(count("sorting_sessions")).toBe(0);
    expect(count("lots")).toBe(0);

    const named = sorting(shed, bag, { piles, cause: "liquid" });
    const receipt = closeSorting(shed.ctx("volunteer"), named);
    expect(receipt).toMatchObject({ differenceGrams: 100, cause: "liquid" });
    expect(
      all(
        "select account, cause, grams from lines where entry_id = (select max(id) from entries) and holder_id is null",
      ),
    ).toEqual([{ account: "loss", cause: "liquid", grams: 100 }]);
  });

  it("asks once about more than the bag held, then posts it as a difference", () => {
    const bag = shed.weigh(1000);
    const piles = [{ grams: 1100 }];
    const ask = sorting(shed, bag, { piles, cause: "liquid" });
    expect(() => closeSorting(shed.ctx("volunteer"), ask)).toThrow("sum-far-above-net");

    const sure = sorting(shed, bag, { piles, confirmedAbove: true });
    const receipt = closeSorting(shed.ctx("volunteer"), sure);
    expect(receipt).toMatchObject({ differenceGrams: -100, cause: null, acceptedGrams: 1100 });
    expect(
      all(
        "select account, grams from lines where entry_id = (select max(id) from entries) and holder_id is null",
      ),
    ).toEqual([{ account: "difference", grams: -100 }]);
    expect(heldBy(shed.db.reader, holderOf(bag.code), UNSORTED)).toBe(0);
  });

  it("takes a listed tare from the list and a typed one as it is", () => {
    const bag = shed.weigh(1000);
    const input = sorting(shed, bag, { piles: [{ grams: 0 }] });
    const reading = {
      grossMilligrams: 1_175_000,
      containerId: shed.crateId,
      // Wrong on purpose: the list says 150 g.
      containerTareMilligrams: 1,
      sackId: null,
      sackTareMilligrams: 25_000,
    };
    const receipt = closeSorting(shed.ctx("volunteer"), {
      ...input,
      piles: [{ ...input.piles[0]!, reading }],
    });
    expect(receipt).toMatchObject({ acceptedGrams: 1000, differenceGrams: 0 });
    expect(all("select mpe_mg as mpe from lines where account = 'lot'")).toEqual([{ mpe: 10_000 }]);
  });

  it.each([
    ["above-max", 30_005_000],
    ["not-a-step", 1_002_000],
    ["net-zero", 0],
  ])("refuses a reading: %s", (code, grossMilligrams) => {
    const bag = shed.weigh(1000);
    const input = sorting(shed, bag, { piles: [{ grams: 1000 }] });
    const wrong = {
      ...input,
      piles: [{ ...input.piles[0]!, reading: { ...onPan(0), grossMilligrams } }],
    };
    expect(() => closeSorting(shed.ctx("volunteer"), wrong)).toThrow(code);
  });

  it("refuses an empty sorting, an unknown colour, an unknown reason", () => {
    const bag = shed.weigh(1000);
    const ctx = shed.ctx("volunteer");
    expect(() => closeSorting(ctx, sorting(shed, bag, {}))).toThrow("piles-empty");
    const colour = sorting(shed, bag, { piles: [{ colour: "tartan", grams: 1000 }] });
    expect(() => closeSorting(ctx, colour)).toThrow("unknown-colour");
    const reason = sorting(shed, bag, { rejects: [{ reason: "whim", grams: 1000 }] });
    expect(() => closeSorting(ctx, reason)).toThrow("unknown-reason");
    expect(count("lots")).toBe(0);
  });

  it("keeps a sorting between its bag's weigh-in and now, whatever the phone's clock says", () => {
    const bag = shed.weigh(1000, { at: noonOf("2026-05-04") });
    const early = sorting(shed, bag, { piles: [{ grams: 1000 }], at: noonOf("2026-04-30") });
    closeSorting(shed.ctx("volunteer"), early);
    expect(all("select occurred_at as at from sorting_sessions")).toEqual([
      { at: noonOf("2026-05-04") },
    ]);

    const other = shed.weigh(700, { at: noonOf("2026-05-04") });
    const late = sorting(shed, other, {
      piles: [{ grams: 700 }],
      at: instant(noonOf("2026-06-30")),
    });
    closeSorting(shed.ctx("volunteer"), late);
    expect(all("select max(occurred_at) as at from sorting_sessions")).toEqual([
      { at: noonOf("2026-05-06") },
    ]);
  });

  it("lets a bag be nothing but reject", () => {
    const bag = shed.weigh(400);
    const receipt = closeSorting(
      shed.ctx("volunteer"),
      sorting(shed, bag, { rejects: [{ reason: "sharps", grams: 400 }] }),
    );
    expect(receipt).toMatchObject({ acceptedGrams: 0, rejectedGrams: 400, lots: [] });
    expect(heldBy(shed.db.reader, holderOf("REJECT-BIN-1"), REJECT)).toBe(400);
  });
});

function holderOf(code: string): number {
  return shed.db.reader.client
    .prepare("select id from holders where code = ?")
    .pluck()
    .get(code) as number;
}
