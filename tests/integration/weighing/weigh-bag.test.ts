import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { AppError } from "@/lib/core/errors";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { heldBy } from "@/lib/ledger/queries/entries";
import { verifyLedger } from "@/lib/ledger/queries/verify";
import { retireScale } from "@/lib/scales/commands/scales";
import { weighBag } from "@/lib/weighing/commands/weigh-bag";
import { posted, weighingDesk, type WeighingDesk } from "@/tests/support/weighing-desk";
import { NOON } from "@/tests/support/scheme";

let desk: WeighingDesk;
beforeEach(() => {
  desk = weighingDesk();
});
afterEach(() => desk.close());

const rows = <T>(sql: string, ...values: unknown[]): T[] =>
  desk.db.reader.client.prepare(sql).all(...values) as T[];
const count = (table: string): number =>
  rows<{ n: number }>(`select count(*) as n from ${table}`)[0]?.n ?? -1;

/** The refusal that a call ends in; and that nothing of it stayed. */
function refusal(work: () => unknown): AppError {
  const before = [count("entries"), count("weigh_ins"), count("receipts"), count("audit_events")];
  try {
    work();
  } catch (error) {
    expect([
      count("entries"),
      count("weigh_ins"),
      count("receipts"),
      count("audit_events"),
    ]).toEqual(before);
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("nothing was refused");
}

describe("weighBag", () => {
  it("puts net = gross − tares into the bag, from its point's origin", () => {
    const [code = ""] = desk.tags(1);
    const receipt = posted(desk.weigh(code));
    expect(receipt).toMatchObject({
      netGrams: 2160,
      lot: null,
      belowMinimum: false,
      tareChanges: [],
    });
    const lines = rows(
      `select account, material_id as material, grams, basis, scale_id as scale, mpe_mg as mpe
        from lines where entry_id = (select max(id) from entries) order by grams`,
    );
    // Gross 3.780 kg is 756 e: ±1 e·2·½… = 10 g in service; the crate (320 e) and the sack ±5 g each.
    expect(lines).toEqual([
      { account: "source", material: 1, grams: -2160, basis: "unchecked", scale: 1, mpe: 20_000 },
      { account: "bag", material: 1, grams: 2160, basis: null, scale: null, mpe: null },
    ]);
    expect(
      rows(
        "select o.type, o.point_id as pointId from line_parts p join origins o on o.no = p.key where p.dim = 'O' and p.grams > 0",
      ),
    ).toEqual([{ type: "donated", pointId: desk.point.id }]);
    expect(rows("select state from bags where code = ?", code)).toEqual([{ state: "weighed" }]);
    expect(verifyLedger(desk.db.reader)).toMatchObject({ ok: true });
  });

  it("leaves one audit row with ids only, and one balanced entry", () => {
    const [code = ""] = desk.tags(1);
    const before = count("audit_events");
    const receipt = posted(desk.weigh(code));
    expect(count("audit_events")).toBe(before + 1);
    const [audit] = rows<{ action: string; actor: string; subject: string; fields: string }>(
      "select action, actor, subject_id as subject, fields from audit_events order by id desc limit 1",
    );
    expect(audit).toMatchObject({
      action: "weighing.record",
      actor: desk.people.volunteer,
      subject: receipt.weighInId,
    });
    expect(audit?.fields).not.toContain("Test");
    expect(rows("select sum(grams) as sum, count(*) as n from lines")).toEqual([{ sum: 0, n: 2 }]);
  });

  it("adds up several readings, each with its own tare, and rounds once", () => {
    const [code = ""] = desk.tags(1);
    const light = {
      containerId: null,
      containerTareMilligrams: 0,
      sackId: null,
      sackTareMilligrams: 0,
    };
    const receipt = posted(
      desk.weigh(
        code,
        {},
        {
          readings: [
            desk.readingOf({}),
            desk.readingOf({ ...light, grossMilligrams: 500_000, sackTareMilligrams: 333_400 }),
            desk.readingOf({ ...light, grossMilligrams: 500_000, sackTareMilligrams: 333_400 }),
          ],
        },
      ),
    );
    // 2160 g + 2 × 166.6 g = 2493.2 g; rounding each would have made 2494.
    expect(receipt.netGrams).toBe(2493);
    expect(count("weigh_in_readings")).toBe(3);
  });

  it("lets the list's tare win over the client's, and says so", () => {
    const [code = ""] = desk.tags(1);
    const receipt = posted(desk.weigh(code, { containerTareMilligrams: 1_000_000 }));
    expect(receipt.netGrams).toBe(2160);
    expect(receipt.tareChanges).toEqual([
      { reading: 0, part: "container", sentMilligrams: 1_000_000, usedMilligrams: 1_600_000 },
    ]);
  });

  it("posts a bag of one kind on into its lot, in the same act", () => {
    const [one = "", two = ""] = desk.tags(2);
    const answer = { polymer: "PE-HD", kind: "lids", colourCode: "blue", oneKind: true };
    const first = posted(desk.weigh(one, {}, answer));
    expect(first.lot).toMatchObject({ number: 1, grams: 2160 });
    expect(posted(desk.weigh(two, {}, answer)).lot).toMatchObject({ number: 1, grams: 4320 });
    expect(rows("select kind, count(distinct act_id) as acts from entries group by kind")).toEqual([
      { kind: "sort", acts: 2 },
      { kind: "weigh-in", acts: 2 },
    ]);
    expect(rows("select state from bags where code in (?, ?)", one, two)).toEqual([
      { state: "sorted" },
      { state: "sorted" },
    ]);
    const [bag] = rows<{ id: number }>("select id from holders where code = ?", one);
    expect(heldBy(desk.db.reader, bag?.id ?? 0, 1)).toBe(0);
    expect(verifyLedger(desk.db.reader)).toMatchObject({ ok: true });
  });

  it("marks a reading under the scale's minimum and takes it", () => {
    const [code = ""] = desk.tags(1);
    const bare = {
      containerId: null,
      containerTareMilligrams: 0,
      sackId: null,
      sackTareMilligrams: 0,
    };
    expect(posted(desk.weigh(code, { ...bare, grossMilligrams: 95_000 })).belowMinimum).toBe(true);
  });

  it("keeps the second reading of a bag for review and says by whom, when and how much", () => {
    const [code = ""] = desk.tags(1);
    desk.weigh(code);
    const second = desk.weigh(
      code,
      { grossMilligrams: 4_000_000 },
      {},
      "lead",
      instant(NOON + 60_000),
    );
    expect(second).toMatchObject({
      kind: "kept-for-review",
      netGrams: 2380,
      earlier: { who: "Test volunteer", when: NOON, netGrams: 2160 },
    });
    expect(count("entries")).toBe(1);
    expect(rows("select state from weigh_ins order by recorded_at")).toEqual([
      { state: "posted" },
      { state: "for-review" },
    ]);
    // Names live only where they can be erased: the receipt, kept for good, has the id.
    expect(
      rows<{ answer: string }>("select answer from receipts")
        .map((r) => r.answer)
        .join(),
    ).not.toContain("Test volunteer");
  });

  it("gives the same answer to the same request twice, and one entry", () => {
    const [code = ""] = desk.tags(1);
    const sent = desk.input(code);
    const first = weighBag(desk.ctx("volunteer", NOON, sent), sent);
    const again = weighBag(desk.ctx("volunteer", instant(NOON + 5000), sent), sent);
    expect(again).toEqual(first);
    expect(count("entries")).toBe(1);
  });

  it("refuses the same id with other content, and from another person", () => {
    const [code = ""] = desk.tags(1);
    const sent = desk.input(code);
    weighBag(desk.ctx("volunteer", NOON, sent), sent);
    const other = { ...sent, condition: "wet" as const };
    for (const work of [
      () => weighBag(desk.ctx("volunteer", NOON, other), other),
      () => weighBag(desk.ctx("lead", NOON, sent), sent),
    ]) {
      expect(refusal(work).code).toBe("request-id-reused");
    }
  });

  it.each(["nobody", "donor"] as const)("refuses %s", (who) => {
    const [code = ""] = desk.tags(1);
    expect(refusal(() => desk.weigh(code, {}, {}, who)).code).toBe(
      who === "nobody" ? "signed-out" : "forbidden",
    );
  });

  it("does not send another helper's ticket in this session", () => {
    const [code = ""] = desk.tags(1);
    const wrong = refusal(() => desk.weigh(code, {}, { helperId: desk.people.lead }));
    expect(wrong.code).toBe("other-helper");
    expect(desk.weigh(code, {}, { helperId: desk.people.volunteer }).kind).toBe("posted");
  });

  it("asks about far more than the point's usual bag, and takes it once confirmed", () => {
    const codes = desk.tags(5);
    for (const code of codes.slice(0, 3)) desk.weigh(code);
    const heavy = { grossMilligrams: 1_620_000 + 6_485_000 };
    expect(desk.weigh(codes[3] ?? "", heavy)).toEqual({
      kind: "ask",
      questions: [{ question: "far-above-usual", netGrams: 6485, usualGrams: 2160 }],
    });
    expect(count("entries")).toBe(3);
    // Under one id: a question is no receipt, or photos that wait for the ticket would lose it.
    const requestId = newId(NOON);
    expect(desk.weigh(codes[3] ?? "", heavy, { requestId }).kind).toBe("ask");
    expect(
      desk.weigh(codes[3] ?? "", heavy, { requestId, confirmed: ["far-above-usual"] }),
    ).toMatchObject({ kind: "posted", weighInId: requestId });
    // Just three times the usual is not more than three times.
    expect(desk.weigh(codes[4] ?? "", { grossMilligrams: 1_620_000 + 6_480_000 }).kind).toBe(
      "posted",
    );
  });

  it("asks about a time that has not come, and books it as now once confirmed", () => {
    const [code = "", other = ""] = desk.tags(2);
    const later = { occurredAt: NOON + 3 * 60_000 };
    expect(desk.weigh(code, {}, later)).toEqual({
      kind: "ask",
      questions: [{ question: "future-time", occurredAt: later.occurredAt, now: NOON }],
    });
    desk.weigh(code, {}, { ...later, confirmed: ["future-time"] });
    desk.weigh(other, {}, { occurredAt: NOON + 60_000 });
    expect(rows("select occurred_at as at from entries")).toEqual([{ at: NOON }, { at: NOON }]);
  });

  it("takes a tag of no point: for the chosen point, else as not known", () => {
    const [code = "", other = ""] = desk.tags(2, null);
    desk.weigh(code, {}, { pointId: desk.point.id });
    desk.weigh(other);
    expect(
      rows("select p.name from weigh_ins w join points p on p.id = w.point_id order by p.name"),
    ).toEqual([{ name: "Harbour Road Library" }, { name: "Not known" }]);
  });

  it("takes a ticket whose scale was retired after the reading, not before it", () => {
    const [code = "", other = ""] = desk.tags(2);
    retireScale(desk.ctx("coordinator", instant(NOON + 1000)), {
      requestId: newId(NOON),
      scaleId: desk.scale.id,
    });
    expect(desk.weigh(code, {}, {}, "volunteer", instant(NOON + 2000)).kind).toBe("posted");
    const late = { occurredAt: NOON + 2000 };
    expect(refusal(() => desk.weigh(other, {}, late, "volunteer", instant(NOON + 3000))).code).toBe(
      "unknown-scale",
    );
  });
});
