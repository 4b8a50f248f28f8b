import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { ErrorCode } from "@/lib/core/errors";
import { newId, type WeighInId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { acceptReading } from "@/lib/weighing/commands/correct";
import { discardReading } from "@/lib/weighing/commands/discard";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import { listForReview } from "@/lib/weighing/queries/stored";
import { refusalOf } from "@/tests/support/command-cases";
import { NOON, type TestScheme } from "@/tests/support/scheme";
import { posted, weighingDesk, type WeighingDesk } from "@/tests/support/weighing-desk";

let desk: WeighingDesk;
beforeEach(() => {
  desk = weighingDesk();
});
afterEach(() => {
  // Whatever was corrected: the chain, every balance, both compositions and every total are what the lines say.
  expect(verifyLedger(desk.db.reader)).toMatchObject({ ok: true });
  desk.close();
});

type Who = Parameters<TestScheme["ctx"]>[0];
const rows = <T>(sql: string, ...values: unknown[]): T[] =>
  desk.db.reader.client.prepare(sql).all(...values) as T[];
const YESTERDAY_PLUS = instant(NOON + 26 * 3_600_000);

const refusedWith = (code: ErrorCode, work: () => unknown): void =>
  expect(refusalOf(work)).toBe(code);

const bagState = (code: string) =>
  rows<{ state: string }>("select state from bags where code = ?", code)[0]?.state;
const totals = () =>
  rows(
    "select sum(collected) as collected, sum(difference) as difference, sum(held) as held, sum(bags) as bags from totals_month",
  )[0];

describe("second readings", () => {
  function weighTwice(): { code: string; first: string; second: string } {
    const [code = ""] = desk.tags(1);
    const first = posted(desk.weigh(code)).weighInId;
    const again = desk.weigh(code, { grossMilligrams: 3_720_000 });
    if (again.kind !== "kept-for-review") throw new Error(again.kind);
    return { code, first, second: again.weighInId };
  }
  const decide = (id: string, who: Who = "lead") => {
    const input = { requestId: newId(NOON), id: id as WeighInId, reason: "Read on the good scale" };
    return { input, ctx: desk.ctx(who, YESTERDAY_PLUS, input) };
  };

  it("are listed beside the reading that counts", () => {
    const { code, first, second } = weighTwice();
    expect(listForReview(desk.ctx("lead")).readings).toMatchObject([
      { id: second, code, netGrams: 2100, first: { id: first, netGrams: 2160 } },
    ]);
    refusedWith("forbidden", () => listForReview(desk.ctx("volunteer")));
  });

  it("accepted, stand in the place of the first", () => {
    const { first, second } = weighTwice();
    const { input, ctx } = decide(second);
    expect(acceptReading(ctx, input)).toMatchObject({
      id: first,
      replacementId: second,
      netGrams: 2100,
    });
    expect(rows("select id, state, corrects from weigh_ins order by id")).toEqual(
      [
        { id: first, state: "corrected", corrects: null },
        { id: second, state: "posted", corrects: first },
      ].sort((a, b) => (a.id < b.id ? -1 : 1)),
    );
    expect(totals()).toEqual({ collected: 2100, difference: 0, held: 2100, bags: 1 });
    expect(listForReview(desk.ctx("lead")).readings).toEqual([]);
    refusedWith("not-for-review", () => acceptReading(decide(second).ctx, decide(second).input));
  });

  it("accepted after the first was undone, are the bag's weighing", () => {
    const { code, first, second } = weighTwice();
    const undo = { requestId: newId(NOON), id: first as WeighInId };
    undoWeighIn(desk.ctx("volunteer", instant(NOON + 1000), undo), undo);
    const { input, ctx } = decide(second);
    expect(acceptReading(ctx, input)).toMatchObject({ bagState: "weighed", netGrams: 2100 });
    expect(bagState(code)).toBe("weighed");
    expect(totals()).toEqual({ collected: 2100, difference: 0, held: 2100, bags: 1 });
  });

  it("discarded with a reason, leave the ledger alone", () => {
    const { second } = weighTwice();
    const { input, ctx } = decide(second);
    discardReading(ctx, input);
    expect(rows("select state from weigh_ins where id = ?", second)).toEqual([
      { state: "discarded" },
    ]);
    expect(rows("select count(*) as n from entries")).toEqual([{ n: 1 }]);
    expect(
      rows(
        `select v.value from audit_values v join audit_events e on e.id = v.event_id
          where e.action = 'weighing.discard' and v.field = 'reason'`,
      ),
    ).toEqual([{ value: "Read on the good scale" }]);
    refusedWith("not-for-review", () => discardReading(decide(second).ctx, decide(second).input));
    refusedWith("forbidden", () =>
      discardReading(decide(second, "volunteer").ctx, decide(second, "volunteer").input),
    );
  });
});
