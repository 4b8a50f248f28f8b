/** Invariant: a period is two days, its end exclusive; people read and type its last day instead. */
import {
  addDays,
  day,
  firstDayOf,
  formatDay,
  formatMonth,
  monthOf,
  nextMonth,
  readDay,
  type Day,
  type Month,
  type Period,
} from "@/lib/core/time";

/** The last day of a period, which is what people read. */
export function lastDayOf(period: Period): Day {
  return addDays(period.until, -1);
}

/** From the first day to the last, both counted. */
export function periodOf(from: Day, last: Day): Period {
  return { from, until: addDays(last, 1) };
}

export function monthPeriod(month: Month): Period {
  return { from: firstDayOf(month), until: firstDayOf(nextMonth(month)) };
}

/** The month so many months earlier. */
export function monthsBefore(month: Month, count: number): Month {
  const index = Number(month.slice(0, 4)) * 12 + Number(month.slice(5, 7)) - 1 - count;
  const year = String(Math.floor(index / 12)).padStart(4, "0");
  return monthOf(day(`${year}-${String((index % 12) + 1).padStart(2, "0")}-01`));
}

export type Shortcut = { name: string; period: Period };

/** The periods that are asked for most: this and the last month, quarter, year. */
export function shortcuts(today: Day): Shortcut[] {
  const month = monthOf(today);
  const quarter = monthsBefore(month, (Number(month.slice(5, 7)) - 1) % 3);
  const year = Number(today.slice(0, 4));
  const span = (from: Month, count: number): Period => ({
    from: firstDayOf(from),
    until: firstDayOf(monthsBefore(from, -count)),
  });
  return [
    { name: "This month", period: monthPeriod(month) },
    { name: "Last month", period: monthPeriod(monthsBefore(month, 1)) },
    { name: "This quarter", period: span(quarter, 3) },
    { name: "Last quarter", period: span(monthsBefore(quarter, 3), 3) },
    { name: "This year", period: span(monthOf(day(`${year}-01-01`)), 12) },
    { name: "Last year", period: span(monthOf(day(`${year - 1}-01-01`)), 12) },
  ];
}

/** "2026", "March to May 2026", "November 2026", "3 March to 20 May 2026". */
export function periodTitle(period: Period): string {
  const last = lastDayOf(period);
  const [from, to] = [monthOf(period.from), monthOf(last)];
  const wholeMonths =
    period.from === firstDayOf(from) && period.until === firstDayOf(nextMonth(to));
  const sameYear = from.slice(0, 4) === to.slice(0, 4);
  if (!wholeMonths) {
    if (period.from === last) return formatDay(last);
    const start = formatDay(period.from);
    return `${sameYear ? start.slice(0, -5) : start} to ${formatDay(last)}`;
  }
  if (from === to) return formatMonth(from);
  if (sameYear && from.endsWith("-01") && to.endsWith("-12")) return from.slice(0, 4);
  return `${sameYear ? formatMonth(from).slice(0, -5) : formatMonth(from)} to ${formatMonth(to)}`;
}

/**
 * The period that a page's address asks for: first and last day as people typed them.
 *
 * @returns null when a day cannot be read or the last comes before the first
 */
export function readPeriod(from: string | undefined, last: string | undefined): Period | null {
  const first = from === undefined ? null : readDay(from);
  const end = last === undefined ? null : readDay(last);
  return first && end && first <= end ? periodOf(first, end) : null;
}

/** "bismar-balance-2026-03-01-2026-05-31.csv": first and last day, both counted. */
export function exportName(
  what: "balance" | "movements",
  period: Period,
  extension: string,
): string {
  return `bismar-${what}-${period.from}-${lastDayOf(period)}.${extension}`;
}
