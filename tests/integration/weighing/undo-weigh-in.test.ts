import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError, type ErrorCode } from "@/lib/core/errors";
import { newId, type WeighInId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { ensureHolder } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { inTransaction } from "@/lib/platform/database";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import { posted, weighingDesk, type WeighingDesk } from "@/tests/support/weighing-desk";
import { NOON, type TestScheme } from "@/tests/support/scheme";

let desk: WeighingDesk;
beforeEach(() => {
  desk = weighingDesk();
});
afterEach(() => desk.close());

const rows = <T>(sql: string, ...values: unknown[]): T[] =>
  desk.db.reader.client.prepare(sql).all(...values) as T[];
const later = (ms: number): Instant => instant(NOON + ms);
function undo(
  id: string,
  who: Parameters<TestScheme["ctx"]>[0] = "volunteer",
  now: Instant = later(1000),
) {
  const input = { requestId: newId(NOON), id: id as WeighInId };
  return undoWeighIn(desk.ctx(who, now, input), input);
}
function refusedWith(code: ErrorCode, work: () => unknown): void {
  try {
    work();
  } catch (error) {
    expect(error).toBeInstanceOf(AppError);
    expect((error as AppError).code).toBe(code);
    return;
  }
  throw new Error("nothing was refused");
}

const ONE_KIND = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true };

describe("undoWeighIn", () => {
  it("reverses the act and gives the bag back its state", () => {
    const [code = ""] = desk.tags(1);
    desk.db.writer.client
      .prepare("update bags set state = 'out', state_since = ? where code = ?")
      .run(NOON - 172_800_000, code);
    const { weighInId } = posted(desk.weigh(code));
    expect(undo(weighInId)).toEqual({ kind: "undone", code, bagState: "out" });
    expect(rows("select state, state_since as since from bags where code = ?", code)).toEqual([
      { state: "out", since: NOON - 172_800_000 },
    ]);
    expect(rows("select sum(grams) as grams from balances")).toEqual([{ grams: 0 }]);
    expect(rows("select kind from entries order by id")).toEqual([
      { kind: "weigh-in" },
      { kind: "reversal" },
    ]);
    expect(verifyLedger(desk.db.reader)).toMatchObject({ ok: true });
  });

  it("takes a bag of one kind back out of its lot, both entries", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code, {}, ONE_KIND));
    undo(weighInId);
    expect(rows("select kind from entries order by id")).toEqual([
      { kind: "weigh-in" },
      { kind: "sort" },
      { kind: "reversal" },
      { kind: "reversal" },
    ]);
    expect(rows("select sum(grams) as grams from balances")).toEqual([{ grams: 0 }]);
    expect(rows("select state from bags where code = ?", code)).toEqual([{ state: "printed" }]);
  });

  it("frees the tag's point again where the weighing had set it", () => {
    const [code = ""] = desk.tags(1, null);
    const { weighInId } = posted(desk.weigh(code, {}, { pointId: desk.point.id }));
    undo(weighInId);
    expect(rows("select point_id as pointId from bags where code = ?", code)).toEqual([
      { pointId: null },
    ]);
  });

  it("lets the bag be weighed again", () => {
    const [code = ""] = desk.tags(1);
    undo(posted(desk.weigh(code)).weighInId);
    expect(posted(desk.weigh(code, { grossMilligrams: 4_000_000 })).netGrams).toBe(2380);
  });

  it("leaves one audit row", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    undo(weighInId);
    expect(
      rows(
        "select action, actor, subject_id as subject from audit_events where action = 'weighing.undo'",
      ),
    ).toEqual([{ action: "weighing.undo", actor: desk.people.volunteer, subject: weighInId }]);
  });

  it("sets a second reading aside", () => {
    const [code = ""] = desk.tags(1);
    desk.weigh(code);
    const second = desk.weigh(code, { grossMilligrams: 4_000_000 });
    if (second.kind !== "kept-for-review") throw new Error("not kept");
    expect(undo(second.weighInId)).toEqual({ kind: "discarded", code, bagState: "weighed" });
    expect(rows("select state from weigh_ins where id = ?", second.weighInId)).toEqual([
      { state: "discarded" },
    ]);
    expect(rows("select count(*) as n from entries")).toEqual([{ n: 1 }]);
  });

  it("replays by request id", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    const input = { requestId: newId(NOON), id: weighInId as WeighInId };
    const first = undoWeighIn(desk.ctx("volunteer", later(1000), input), input);
    expect(undoWeighIn(desk.ctx("volunteer", later(2000), input), input)).toEqual(first);
    expect(rows("select count(*) as n from entries")).toEqual([{ n: 2 }]);
  });

  it("refuses the wrong role, another person, an unknown one, a second time and too late", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    refusedWith("forbidden", () => undo(weighInId, "donor"));
    refusedWith("signed-out", () => undo(weighInId, "nobody"));
    refusedWith("undo-not-yours", () => undo(weighInId, "coordinator"));
    refusedWith("not-found", () => undo(newId(NOON)));
    refusedWith("undo-too-late", () => undo(weighInId, "volunteer", later(600_001)));
    undo(weighInId, "volunteer", later(600_000));
    refusedWith("undone-already", () => undo(weighInId, "volunteer", later(600_000)));
  });

  it("is withdrawn once something was taken from what it filled", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    inTransaction(desk.ctx("system"), (tx) =>
      postAct(tx, { now: later(500), doneBy: "tester", sentBy: "tester", device: null }, [
        {
          kind: "sort",
          occurredAt: later(500),
          subject: "sorting:test",
          lines: [
            { account: "bag", holderId: ensureHolder(tx, "bag", code), materialId: 1, grams: -100 },
            {
              account: "reject-bin",
              holderId: ensureHolder(tx, "reject-bin", "REJECT-BIN-1"),
              materialId: 2,
              grams: 100,
            },
          ],
        },
      ]),
    );
    refusedWith("undo-used-since", () => undo(weighInId));
  });
});
