import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { ErrorCode } from "@/lib/core/errors";
import { newId, type WeighInId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { ensureHolder, ensureMaterial } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { inTransaction } from "@/lib/platform/database";
import { correctWeighIn } from "@/lib/weighing/commands/correct";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import type { CorrectWeighInInput } from "@/lib/weighing/contract/corrections";
import { getStoredWeighIn, getWeighInPage } from "@/lib/weighing/queries/stored";
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
const ONE_KIND = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true } as const;

type Change = { grossMilligrams?: number } & Partial<
  NonNullable<CorrectWeighInInput["replacement"]>
>;

/** What the form sends: everything as it was saved, but for what is changed. */
function replacementOf(id: string, { grossMilligrams, ...change }: Change = {}) {
  const stored = getStoredWeighIn(desk.db.reader, id as WeighInId);
  if (!stored) throw new Error("no weigh-in");
  const { scaleId, occurredAt, readings, polymer, kind, colourCode, oneKind, condition, pointId } =
    stored;
  return {
    scaleId,
    occurredAt,
    polymer,
    kind,
    colourCode,
    oneKind,
    condition,
    pointId,
    readings: readings.map((reading) => ({
      ...reading,
      grossMilligrams: grossMilligrams ?? reading.grossMilligrams,
    })),
    ...change,
  };
}

function correct(
  id: string,
  replacement: CorrectWeighInInput["replacement"],
  { who = "lead", now = YESTERDAY_PLUS }: { who?: Who; now?: Instant } = {},
) {
  const input = {
    requestId: newId(NOON),
    id: id as WeighInId,
    reason: "The crate was read twice",
    replacement,
  };
  return correctWeighIn(desk.ctx(who, now, input), input);
}

const refusedWith = (code: ErrorCode, work: () => unknown): void =>
  expect(refusalOf(work)).toBe(code);

const bagState = (code: string) =>
  rows<{ state: string }>("select state from bags where code = ?", code)[0]?.state;
const totals = () =>
  rows(
    "select sum(collected) as collected, sum(difference) as difference, sum(held) as held, sum(bags) as bags from totals_month",
  )[0];

describe("correctWeighIn", () => {
  it("replaces the net in one act and keeps both records", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    const receipt = correct(weighInId, replacementOf(weighInId, { grossMilligrams: 3_720_000 }));
    expect(receipt).toMatchObject({
      code,
      netGrams: 2100,
      bagState: "weighed",
      later: { count: 0 },
    });
    expect(
      rows("select state, net_grams as net, corrects from weigh_ins order by recorded_at"),
    ).toEqual([
      { state: "corrected", net: 2160, corrects: null },
      { state: "posted", net: 2100, corrects: weighInId },
    ]);
    expect(rows("select kind, act_id as act from entries order by id")).toEqual([
      { kind: "weigh-in", act: 1 },
      { kind: "reversal", act: 2 },
      { kind: "weigh-in", act: 2 },
    ]);
    expect(totals()).toEqual({ collected: 2100, difference: 0, held: 2100, bags: 1 });
    // It counts on the day on which the bag came, not on that of the correction.
    expect(rows("select distinct booked_day as day from entries")).toEqual([{ day: "2026-05-06" }]);
    expect(getWeighInPage(desk.ctx("volunteer"), weighInId)?.correction).toMatchObject({
      reason: "The crate was read twice",
      replacementId: receipt.replacementId,
    });
  });

  it("always goes through: what a used lot no longer holds is difference, and the uses are named", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code, {}, ONE_KIND));
    inTransaction(desk, (tx) => {
      const lot = rows<{ holderId: number; materialId: number }>(
        "select holder_id as holderId, material_id as materialId from lots",
      )[0];
      if (!lot) throw new Error("no lot");
      const flake = ensureMaterial(tx, {
        polymer: "PE-HD",
        kind: "lids",
        colourCode: "blue",
        form: "flake",
        wash: "as-received",
      });
      const person = desk.people.lead;
      postAct(tx, { now: NOON, doneBy: person, sentBy: person, device: null }, [
        {
          kind: "step",
          occurredAt: NOON,
          subject: "step:one",
          lines: [
            { account: "lot", ...lot, grams: -2160 },
            {
              account: "lot",
              holderId: ensureHolder(tx, "lot", "FLAKE001"),
              materialId: flake,
              grams: 2160,
            },
          ],
        },
      ]);
    });
    const receipt = correct(weighInId, replacementOf(weighInId, { grossMilligrams: 3_720_000 }));
    expect(receipt.later).toMatchObject({
      count: 1,
      uses: [{ kind: "step", subject: "step:one", grams: 2160 }],
    });
    expect(totals()).toEqual({ collected: 2100, difference: -60, held: 2160, bags: 1 });
    expect(rows("select kind from entries where act_id = 4 order by id")).toEqual([
      { kind: "reversal" },
      { kind: "reversal" },
      { kind: "weigh-in" },
      { kind: "sort" },
      { kind: "settling" },
    ]);
  });

  it("leaves a bag of one kind in its lot, though that closed since", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code, {}, ONE_KIND));
    desk.db.writer.client.prepare("update lots set closed_at = ?, closed_for = 'full'").run(NOON);
    correct(weighInId, replacementOf(weighInId, { grossMilligrams: 3_720_000 }));
    expect(
      rows("select l.number, b.grams from lots l join balances b on b.holder_id = l.holder_id"),
    ).toEqual([{ number: 1, grams: 2100 }]);
    // What is of another material lies elsewhere.
    const latest =
      rows<{ id: string }>("select id from weigh_ins where state = 'posted'")[0]?.id ?? "";
    correct(latest, replacementOf(latest, { colourCode: "white" }));
    expect(
      rows(
        "select l.number, b.grams from lots l join balances b on b.holder_id = l.holder_id order by 1",
      ),
    ).toEqual([
      { number: 1, grams: 0 },
      { number: 2, grams: 2100 },
    ]);
  });

  it("moves a bag of the wrong point to the right one", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    const other = rows<{ id: string }>("select id from points where kind = 'shed'")[0]?.id as never;
    correct(weighInId, replacementOf(weighInId, { pointId: other }));
    expect(rows("select point_id as point from bags where code = ?", code)).toEqual([
      { point: other },
    ]);
    expect(
      rows(
        `select o.point_id as point, sum(t.collected) as collected from totals_day t join origins o on o.no = t.origin_no
          group by 1 having sum(t.collected) <> 0`,
      ),
    ).toEqual([{ point: other, collected: 2160 }]);
  });

  it("turns a bag of one kind into one that waits for sorting", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code, {}, ONE_KIND));
    expect(correct(weighInId, replacementOf(weighInId, { oneKind: false })).bagState).toBe(
      "weighed",
    );
    expect(bagState(code)).toBe("weighed");
    expect(
      rows("select sum(grams) as grams from balances b join lots l on l.holder_id = b.holder_id"),
    ).toEqual([{ grams: 0 }]);
  });

  it("takes a weigh-in that never was back whole, also through a chain of corrections", () => {
    const [code = ""] = desk.tags(1);
    desk.db.writer.client
      .prepare("update bags set state = 'out', state_since = 5 where code = ?")
      .run(code);
    const { weighInId } = posted(desk.weigh(code));
    const { replacementId } = correct(
      weighInId,
      replacementOf(weighInId, { grossMilligrams: 3_720_000 }),
    );
    expect(correct(replacementId ?? "", null)).toMatchObject({ netGrams: null, bagState: "out" });
    expect(bagState(code)).toBe("out");
    expect(totals()).toEqual({ collected: 0, difference: 0, held: 0, bags: 0 });
    // The bag can be weighed anew.
    expect(desk.weigh(code, {}, { occurredAt: NOON }).kind).toBe("posted");
  });

  it("refuses volunteers, what was corrected already, and a replacement that no scale can have shown", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    refusedWith("forbidden", () => correct(weighInId, null, { who: "volunteer" }));
    refusedWith("not-a-step", () =>
      correct(weighInId, replacementOf(weighInId, { grossMilligrams: 3_720_001 })),
    );
    refusedWith("net-zero", () =>
      correct(weighInId, replacementOf(weighInId, { grossMilligrams: 1_620_000 })),
    );
    refusedWith("one-kind-needs-material", () =>
      correct(weighInId, replacementOf(weighInId, { oneKind: true })),
    );
    expect(rows("select count(*) as n from entries")).toEqual([{ n: 1 }]);
    const { replacementId } = correct(weighInId, replacementOf(weighInId));
    refusedWith("corrected-already", () => correct(weighInId, null));
    const undo = { requestId: newId(NOON), id: replacementId as WeighInId };
    refusedWith("undo-of-correction", () =>
      undoWeighIn(desk.ctx("lead", YESTERDAY_PLUS, undo), undo),
    );
  });

  it("does it once for a request id and leaves one audit row", () => {
    const [code = ""] = desk.tags(1);
    const { weighInId } = posted(desk.weigh(code));
    const input = {
      requestId: newId(NOON),
      id: weighInId as WeighInId,
      reason: "Wrong crate",
      replacement: replacementOf(weighInId),
    };
    const first = correctWeighIn(desk.ctx("lead", YESTERDAY_PLUS, input), input);
    expect(correctWeighIn(desk.ctx("lead", YESTERDAY_PLUS, input), input)).toEqual(first);
    expect(
      rows("select action, actor from audit_events where action = 'weighing.correct'"),
    ).toEqual([{ action: "weighing.correct", actor: desk.people.lead }]);
    expect(rows("select count(*) as n from corrections")).toEqual([{ n: 1 }]);
  });
});
