/** Everything that a report's page shows, read on one state of the ledger. */
import "server-only";
import { dayOf, instant, monthOf, type Day, type Month, type Period } from "@/lib/core/time";
import { ledgerHead, type LedgerHead } from "@/lib/ledger/queries/entries";
import type { LastVerification } from "@/lib/ledger/contract";
import { lastVerification } from "@/lib/ledger/queries/last-verification";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import { sumFigures, type Figures } from "../rules/balance";
import { expandedGrams, gramsByBasis } from "../rules/uncertainty";
import { ROWS_A_PAGE, type Grouping } from "../terms";
import { listBalance, type BalanceRow } from "./balance";
import { hasBalance } from "./balance-csv";
import { readChart, type Chart } from "./chart";
import { inWorkAt } from "./in-work";
import { listScaleTotals, type MonthScaleTotal } from "./scale-totals";

export type Weighed = {
  grams: number;
  /** ± 2 u */
  expandedGrams: number;
  byBasis: ReturnType<typeof gramsByBasis>;
};

export type Report = {
  period: Period;
  today: Day;
  /** False when history from before the first day is in it. */
  hasBalance: boolean;
  total: Figures;
  /** The closing stock in four parts, which add up to it. */
  closing: { unsorted: number; sorted: number; inWork: number; reject: number };
  /** Drop-off points whose bags were weighed in. */
  points: number;
  collected: Weighed;
  accepted: Weighed;
  months: { month: Month; collected: Weighed; accepted: Weighed }[];
  chart: Chart;
  /** One page of the rows, and their number in all. */
  rows: BalanceRow[];
  rowCount: number;
  head: LedgerHead;
  /** The last verification that came to an end, and its day in the scheme's zone. */
  verified: LastVerification;
  verifiedDay: Day | null;
};

/**
 * @param page of the rows, from 1; beyond the last one there are no rows
 */
export function getReport(
  ctx: Context,
  input: { period: Period; by: readonly Grouping[]; page: number },
): Report {
  allow(ctx, "reports.read");
  const { period, by, page } = input;
  return inSnapshot<Report>(ctx, (db) => {
    const scheme = requireScheme(db);
    const today = dayOf(ctx.now, scheme.timeZone);
    const byPolymer = listBalance(db, period, ["polymer"], today);
    const total = sumFigures(byPolymer.map((row) => row.figures));
    const closingOf = (polymer: string): number =>
      byPolymer.find((row) => row.polymer === polymer)?.figures.closing ?? 0;
    const unsorted = closingOf("unsorted");
    const reject = closingOf("reject");
    const inWork = inWorkAt(db, period.until);
    const byPoint = listBalance(db, period, ["point"], today);
    const weighed = listScaleTotals(db, period);
    const rows = by.length === 0 ? [] : listBalance(db, period, by, today);
    const verified = lastVerification(db);
    const touched = [...new Set(weighed.map((one) => one.month))].sort();
    return {
      period,
      today,
      hasBalance: hasBalance(period, scheme.firstDay, byPolymer),
      total,
      closing: { unsorted, reject, inWork, sorted: total.closing - unsorted - reject - inWork },
      points: byPoint.filter((row) => row.pointName !== null && row.figures.collected > 0).length,
      collected: weighedAs(weighed, "collected"),
      accepted: weighedAs(weighed, "accepted"),
      months: touched.map((month) => {
        const own = weighed.filter((one) => one.month === month);
        return {
          month,
          collected: weighedAs(own, "collected"),
          accepted: weighedAs(own, "accepted"),
        };
      }),
      chart: readChart(db, period, today),
      rows: rows.slice((page - 1) * ROWS_A_PAGE, page * ROWS_A_PAGE),
      rowCount: rows.length,
      head: ledgerHead(db),
      verified,
      verifiedDay: verified.at === null ? null : dayOf(instant(verified.at), scheme.timeZone),
    };
  });
}

function weighedAs(totals: readonly MonthScaleTotal[], measure: "collected" | "accepted"): Weighed {
  const own = totals.filter((one) => one.measure === measure);
  return {
    grams: own.reduce((sum, one) => sum + one.grams, 0),
    expandedGrams: expandedGrams(own),
    byBasis: gramsByBasis(own),
  };
}

/** The month in which the context's now falls: what a report without dates shows. */
export function presentMonth(ctx: Context): { today: Day; month: Month } {
  const today = dayOf(ctx.now, requireScheme(ctx.db.reader).timeZone);
  return { today, month: monthOf(today) };
}
