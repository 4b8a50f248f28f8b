import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { addDays, day, type Day } from "@/lib/core/time";
import { ensureHolder } from "@/lib/ledger/commands/define";
import { postAct } from "@/lib/ledger/commands/post";
import { heldBy } from "@/lib/ledger/queries/entries";
import { REJECT } from "@/lib/ledger/terms";
import { inTransaction } from "@/lib/platform/database";
import { listBalance, type BalanceRow } from "@/lib/reports/queries/balance";
import { getReport } from "@/lib/reports/queries/report";
import { imbalanceOf, sumFigures } from "@/lib/reports/rules/balance";
import { GROUPINGS, type Grouping } from "@/lib/reports/terms";
import { closeSorting } from "@/lib/sorting/commands/close";
import { undoSorting } from "@/lib/sorting/commands/undo";
import { newShed, noonOf, sorting, type Shed } from "../../support/shed";
import { plainReport, type Plain } from "./plain-report";

type Step = {
  /** Days after the step before. */
  after: number;
  point: number;
  /** Net in steps of the scale. */
  fives: number;
  shares: number[];
  colours: number[];
  rejectShare: number;
  /** Steps of the scale that are missing (or, below zero, too much). */
  off: number;
  undo: boolean;
  /** Of the reject bin, in tenths; 0: no removal. */
  removed: number;
  /** Moves a tenth of the first lot to the bin. */
  turnedAway: boolean;
};

const step: fc.Arbitrary<Step> = fc.record({
  after: fc.integer({ min: 0, max: 12 }),
  point: fc.integer({ min: 0, max: 2 }),
  fives: fc.integer({ min: 40, max: 1200 }),
  shares: fc.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 4 }),
  colours: fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 4, maxLength: 4 }),
  rejectShare: fc.integer({ min: 0, max: 3 }),
  off: fc.integer({ min: -12, max: 12 }),
  undo: fc.boolean(),
  removed: fc.integer({ min: 0, max: 10 }),
  turnedAway: fc.boolean(),
});

const COLOURS = ["blue", "white", "red", "black"] as const;
const POLYMERS = ["PE-HD", "PP", "not-sure", "PE-HD"] as const;
const START = day("2026-02-20");

/** Splits whole steps of 5 g by shares; the last takes the rest. */
function inFives(total: number, shares: readonly number[]): number[] {
  const whole = shares.reduce((sum, share) => sum + share, 0);
  const parts = shares.map((share) => Math.floor((total * share) / whole));
  parts[parts.length - 1] = total - parts.slice(0, -1).reduce((sum, part) => sum + part, 0);
  return parts.filter((part) => part > 0).map((part) => part * 5);
}

function live(shed: Shed, steps: readonly Step[]): Day {
  let today = START;
  for (const one of steps) {
    today = addDays(today, one.after);
    const at = noonOf(today);
    const bag = shed.weigh(one.fives * 5, { at, point: one.point });
    const weighed = Math.max(one.fives - one.off, 1);
    const rejected = Math.floor((weighed * one.rejectShare) / 10);
    const ctx = shed.ctx("volunteer", at);
    const receipt = closeSorting(
      ctx,
      sorting(shed, bag, {
        at,
        piles: inFives(weighed - rejected, one.shares).map((grams, pile) => ({
          grams,
          colour: COLOURS[one.colours[pile] ?? 0],
          polymer: POLYMERS[one.colours[pile] ?? 0],
        })),
        rejects: rejected > 0 ? [{ grams: rejected * 5 }] : [],
        cause: "dirt",
        confirmedAbove: true,
      }),
    );
    if (one.undo) undoSorting(ctx, { requestId: newId(at), id: receipt.sortingId });
    inTransaction(shed, (tx) => {
      const bin = ensureHolder(tx, "reject-bin", "REJECT-BIN-1");
      const removed = Math.floor((heldBy(tx, bin, REJECT) * one.removed) / 10);
      const meta = { now: at, doneBy: "p", sentBy: "p", device: null };
      if (removed > 0) {
        postAct(tx, meta, [
          {
            kind: "removal",
            occurredAt: at,
            subject: "removal:test",
            lines: [
              { account: "reject-bin", holderId: bin, materialId: REJECT, grams: -removed },
              { account: "disposed", grams: removed },
            ],
          },
        ]);
      }
      const lot = tx.client
        .prepare(
          "select holder_id as holderId, material_id as materialId from lots order by number limit 1",
        )
        .get() as { holderId: number; materialId: number } | undefined;
      const away = lot ? Math.floor(heldBy(tx, lot.holderId, lot.materialId) / 10) : 0;
      if (one.turnedAway && lot && away > 0) {
        postAct(tx, meta, [
          {
            kind: "move",
            occurredAt: at,
            subject: "move:test",
            lines: [
              { account: "lot", ...lot, grams: -away },
              { account: "reject-bin", holderId: bin, materialId: REJECT, grams: away },
            ],
          },
        ]);
      }
    });
  }
  return today;
}

const PLAIN_KEYS = [
  "opening",
  "collected",
  "disposed",
  "loss",
  "difference",
  "accepted",
  "rejected",
  "resorted",
  "closing",
  "bags",
] as const satisfies readonly (keyof Plain)[];

function asPlain(rows: readonly BalanceRow[], by: readonly Grouping[]): Map<string, Plain> {
  return new Map(
    rows.map((row) => {
      const values: Record<Grouping, string | number | null> = {
        month: row.month,
        point: row.originNo,
        polymer: row.polymer,
        kind: row.kind,
        colour: row.colourCode,
      };
      const figures = Object.fromEntries(PLAIN_KEYS.map((key) => [key, row.figures[key]])) as Plain;
      return [by.map((grouping) => values[grouping]).join("|"), figures];
    }),
  );
}

const sorted = (map: Map<string, Plain>) => [...map].sort(([a], [b]) => a.localeCompare(b));

describe("the mass balance", () => {
  it("is that of the lines, for any days and any breakdown, and balances to the gram in every row", () => {
    fc.assert(
      fc.property(
        fc.array(step, { minLength: 1, maxLength: 14 }),
        fc.subarray([...GROUPINGS]),
        fc.integer({ min: -10, max: 90 }),
        fc.integer({ min: 1, max: 120 }),
        (steps, by, offset, length) => {
          const shed = newShed();
          try {
            const today = live(shed, steps);
            const from = addDays(START, offset);
            const until = addDays(from, length);
            const still = by.filter((grouping) => grouping !== "month");
            const rows = listBalance(shed.db.reader, { from, until }, by, today);
            for (const row of rows) expect(imbalanceOf(row.figures)).toBe(0);

            const months = by.includes("month")
              ? [...new Set(rows.map((row) => row.month))]
              : [null];
            for (const month of months) {
              const own = rows.filter((row) => row.month === month);
              expect(sumFigures(own.map((row) => row.figures)).resorted).toBe(0);
              const [first, end] =
                month === null
                  ? [from as string, until as string]
                  : [
                      [from, `${month}-01`].sort()[1] ?? from,
                      [until, addDays(day(`${month}-28`), 4).slice(0, 7) + "-01"].sort()[0] ??
                        until,
                    ];
              expect(sorted(asPlain(own, still))).toEqual(
                sorted(plainReport(shed.db, first, end, still)),
              );
            }
          } finally {
            shed.close();
          }
        },
      ),
      { numRuns: 40 },
    );
  });

  it("has months that follow on from each other: one's closing is the next one's opening", () => {
    const shed = newShed();
    try {
      const bag = shed.weigh(1000, { at: noonOf("2026-02-10") });
      const at = noonOf("2026-04-02");
      closeSorting(shed.ctx("volunteer", at), sorting(shed, bag, { at, piles: [{ grams: 1000 }] }));
      const rows = listBalance(
        shed.db.reader,
        { from: day("2026-02-01"), until: day("2026-06-01") },
        ["month", "polymer"],
        day("2026-05-06"),
      );
      expect(
        rows.map(({ month, polymer, figures }) => [
          month,
          polymer,
          figures.opening,
          figures.resorted,
          figures.closing,
        ]),
      ).toEqual([
        ["2026-02", "unsorted", 0, 0, 1000],
        ["2026-03", "unsorted", 1000, 0, 1000],
        ["2026-04", "unsorted", 1000, -1000, 0],
        ["2026-04", "PE-HD", 0, 1000, 1000],
        ["2026-05", "PE-HD", 1000, 0, 1000],
      ]);
    } finally {
      shed.close();
    }
  });

  it("shows the closing stock in parts that add up, and ± 2 u by hand", () => {
    const shed = newShed();
    try {
      const a = shed.weigh(2160, { at: noonOf("2026-05-04") });
      shed.weigh(500, { at: noonOf("2026-05-05"), point: 1 });
      closeSorting(
        shed.ctx("volunteer"),
        sorting(shed, a, { piles: [{ grams: 2000 }], rejects: [{ grams: 150 }] }),
      );
      for (const [from, until] of [
        ["2026-05-01", "2026-06-01"],
        ["2026-05-02", "2026-05-20"],
      ] as const) {
        const report = getReport(shed.ctx("lead"), {
          period: { from: day(from), until: day(until) },
          by: ["polymer"],
          page: 1,
        });
        expect(report.closing).toEqual({ unsorted: 500, sorted: 2000, inWork: 0, reject: 150 });
        expect(report.total).toMatchObject({
          collected: 2660,
          difference: 10,
          closing: 2650,
          bags: 2,
        });
        expect(report.points).toBe(2);
        // Two weigh-ins of ± 10 g on one scale: 20 g; 2 × 20 / √3 = 23.09, rounded up.
        expect(report.collected).toEqual({
          grams: 2660,
          expandedGrams: 24,
          byBasis: [{ basis: "unchecked", grams: 2660 }],
        });
        // One pile of up to 500 e = 2.5 kg: ± 5 g; 2 × 5 / √3 = 5.77.
        expect(report.accepted).toMatchObject({ grams: 2000, expandedGrams: 6 });
      }
    } finally {
      shed.close();
    }
  });

  it("is for leads and coordinators only", () => {
    const shed = newShed();
    try {
      const input = { period: { from: START, until: addDays(START, 1) }, by: [], page: 1 };
      expect(() => getReport(shed.ctx("volunteer"), input)).toThrow("forbidden");
      expect(() => getReport(shed.ctx("nobody"), input)).toThrow("signed-out");
      expect(getReport(shed.ctx("lead"), input).rowCount).toBe(0);
    } finally {
      shed.close();
    }
  });
});
