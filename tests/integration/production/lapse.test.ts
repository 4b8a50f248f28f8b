/** What the program does with reservations by itself: it warns a day before, tells of shortages, lets them lapse. */
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { tendReservations } from "@/lib/production/commands/lapse";
import { callOffRun } from "@/lib/production/commands/plan-run";
import { prolong } from "@/lib/production/commands/reserve";
import type { RunReceipt } from "@/lib/production/contract/plans";
import { countLot } from "@/lib/stock/commands/count-lot";
import { count, rows } from "../../support/stock-work";
import { auditRows } from "../../support/command-cases";
import { NOON } from "../../support/scheme";
import { DRY_FLAKE, HOOKS_GRAMS, newWorkshop, type Workshop } from "../../support/workshop";

const DAY = 24 * 60 * 60 * 1000;
const after = (days: number, more = 0): Instant => instant(NOON + days * DAY + more);

let shop: Workshop;
let lot: number;
beforeEach(() => {
  shop = newWorkshop();
  lot = shop.fill(5000, DRY_FLAKE);
});
afterEach(() => shop.close());

const tend = (at: Instant) => tendReservations(shop.ctx("system", at));
const NOTHING = { warned: 0, short: 0, lapsed: 0 };
const mails = () =>
  rows(shop, "select to_address as [to], subject, body from outbox order by id") as {
    to: string;
    subject: string;
    body: string;
  }[];
const subjects = () => mails().map(({ subject }) => subject);
const states = () =>
  rows(shop, "select state from reservations order by seq").map(
    (row) => (row as { state: string }).state,
  );
const prolongAt = (run: RunReceipt, at: Instant) => {
  const input = { requestId: newId(at), runId: run.id };
  return prolong(shop.ctx("lead", at, input), input);
};
const counted = (grams: number, number = lot) => {
  const input = count(shop, number, grams, { confirmed: true });
  return countLot(shop.ctx("volunteer", NOON, input), input);
};
const another = (grams: number) => {
  shop.db.writer.client
    .prepare("update lots set closed_at = ?, closed_for = 'full' where closed_at is null")
    .run(NOON);
  return shop.fill(grams, DRY_FLAKE);
};

describe("a reservation that nobody uses", () => {
  it("is told of a day before, once, and lapses on its day", () => {
    shop.reserve(shop.plan());
    expect(tend(after(13, -1))).toEqual(NOTHING);
    expect(tend(after(13))).toEqual({ ...NOTHING, warned: 1 });
    expect(mails()).toEqual([
      {
        to: "lead@saltmarsh.example",
        subject: "Run 1: 1.176 kg are free again on 20 May 2026",
        body: expect.stringMatching(/Coat hook[\s\S]*\/runs\/1\n$/) as string,
      },
    ]);
    expect(tend(after(13, 1000))).toEqual(NOTHING);
    expect(tend(after(14, -1))).toEqual(NOTHING);
    expect(states()).toEqual(["held"]);
    expect(tend(after(14))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(states()).toEqual(["lapsed"]);
    expect(shop.promised(lot)).toEqual([]);
    expect(auditRows(shop).at(-1)).toEqual({ action: "runs.lapse", actor: null });
    expect(tend(after(15))).toEqual(NOTHING);
    expect(mails()).toHaveLength(1);
  });

  it("can be reserved again, and by others", () => {
    const run = shop.plan();
    shop.reserve(run, [{ number: lot, grams: 5000 }]);
    tend(after(14));
    const other = shop.plan();
    expect(shop.reserve(other, [{ number: lot, grams: 4500 }], after(14)).grams).toBe(4500);
    expect(shop.reserve(run, undefined, after(14))).toMatchObject({
      grams: 500,
      uncovered: [{ grams: HOOKS_GRAMS - 500 }],
    });
  });

  it("stands on from where it was prolonged, and is told of again", () => {
    const run = shop.plan();
    shop.reserve(run);
    tend(after(13));
    expect(prolongAt(run, after(13, 1000)).lapsesAt).toBe(after(27, 1000));
    expect(tend(after(14))).toEqual(NOTHING);
    expect(tend(after(26, 1000))).toEqual({ ...NOTHING, warned: 1 });
    expect(subjects()).toEqual([
      "Run 1: 1.176 kg are free again on 20 May 2026",
      "Run 1: 1.176 kg are free again on 2 June 2026",
    ]);
    expect(tend(after(27, 1000))).toEqual({ ...NOTHING, lapsed: 1 });
  });

  it("lapses by itself: what the run reserved later stands, and is told of on its own day", () => {
    const run = shop.plan();
    shop.reserve(run, [{ number: lot, grams: 500 }]);
    shop.reserve(run, [{ number: lot, grams: 300 }], after(4));
    expect(tend(after(13))).toEqual({ ...NOTHING, warned: 1 });
    expect(tend(after(14))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(states()).toEqual(["lapsed", "held"]);
    expect(rows(shop, "select fields from audit_events where action = 'runs.lapse'")).toEqual([
      { fields: expect.stringContaining("500") as string },
    ]);
    expect(tend(after(17))).toEqual({ ...NOTHING, warned: 1 });
    expect(subjects()).toEqual([
      "Run 1: 0.500 kg are free again on 20 May 2026",
      "Run 1: 0.300 kg are free again on 24 May 2026",
    ]);
    expect(tend(after(18))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(states()).toEqual(["lapsed", "lapsed"]);
  });

  it("uses the scheme's own days, and says nothing of what was given back", () => {
    shop.db.writer.client.prepare("update scheme_limits set reservation_days = 3").run();
    const [run, other] = [shop.plan(), shop.plan()];
    shop.reserve(run);
    shop.reserve(other);
    const input = { requestId: newId(NOON), runId: other.id };
    callOffRun(shop.ctx("lead", NOON, input), input);
    expect(tend(after(2))).toEqual({ ...NOTHING, warned: 1 });
    expect(tend(after(3))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(states()).toEqual(["lapsed", "released"]);
    expect(mails()).toHaveLength(1);
  });

  it("lapses without a mail when who reserved it has left", () => {
    shop.reserve(shop.plan());
    shop.db.writer.client
      .prepare("update people set removed_at = ? where id = ?")
      .run(NOON, shop.people.lead);
    expect(tend(after(13))).toEqual({ ...NOTHING, warned: 1 });
    expect(tend(after(14))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(mails()).toEqual([]);
  });

  it("of many runs ends in goes of fifty", () => {
    shop.fill(20_000, DRY_FLAKE);
    for (let at = 0; at < 53; at += 1) shop.reserve(shop.plan(), [{ number: lot, grams: 10 }]);
    expect(tend(after(14))).toMatchObject({ lapsed: 50 });
    expect(tend(after(14))).toMatchObject({ lapsed: 3 });
    expect(new Set(states())).toEqual(new Set(["lapsed"]));
  });
});

describe("a reservation that turned short", () => {
  it("is told of once, and again when it was covered in between", () => {
    shop.reserve(shop.plan());
    expect(tend(NOON)).toEqual(NOTHING);
    counted(1000);
    expect(tend(NOON)).toEqual({ ...NOTHING, short: 1 });
    expect(mails()).toEqual([
      {
        to: "lead@saltmarsh.example",
        subject: "Run 1 is short by 0.176 kg",
        body: expect.stringMatching(
          /Coat hook[\s\S]*1\.176 kg reserved[\s\S]*\/runs\/1\n$/,
        ) as string,
      },
    ]);
    expect(tend(NOON)).toEqual(NOTHING);
    counted(900);
    expect(tend(NOON)).toEqual(NOTHING);
    counted(2000);
    expect(tend(NOON)).toEqual(NOTHING);
    counted(1100);
    expect(tend(NOON)).toEqual({ ...NOTHING, short: 1 });
    expect(subjects()).toEqual(["Run 1 is short by 0.176 kg", "Run 1 is short by 0.076 kg"]);
  });

  it("tells the newest only, and the elder when it loses as well", () => {
    const [elder, newest] = [shop.plan(), shop.plan()];
    shop.reserve(elder);
    shop.reserve(newest);
    counted(2000);
    expect(tend(NOON)).toEqual({ ...NOTHING, short: 1 });
    counted(1000);
    expect(tend(NOON)).toEqual({ ...NOTHING, short: 1 });
    expect(subjects()).toEqual(["Run 2 is short by 0.352 kg", "Run 1 is short by 0.176 kg"]);
  });

  it("is told of lot by lot, with all that the run lacks by then", () => {
    const second = another(5000);
    const run = shop.plan();
    shop.reserve(run, [
      { number: lot, grams: 700 },
      { number: second, grams: 476 },
    ]);
    counted(600);
    tend(NOON);
    counted(400, second);
    expect(tend(NOON)).toEqual({ ...NOTHING, short: 1 });
    expect(tend(NOON)).toEqual(NOTHING);
    expect(subjects()).toEqual(["Run 1 is short by 0.100 kg", "Run 1 is short by 0.176 kg"]);
    for (const { body } of mails()) expect(body).toContain("of the 1.176 kg reserved");
  });

  it("is not told of when it lapses in the same go", () => {
    shop.reserve(shop.plan());
    counted(1000);
    expect(tend(after(14))).toEqual({ ...NOTHING, lapsed: 1 });
    expect(mails()).toEqual([]);
  });
});
