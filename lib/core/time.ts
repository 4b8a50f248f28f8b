/**
 * Instants, days and months. An instant is epoch milliseconds; a day is `YYYY-MM-DD` and a month
 * `YYYY-MM` in the scheme's own zone; a period is two days, its end exclusive.
 */

declare const instantBrand: unique symbol;
declare const dayBrand: unique symbol;
declare const monthBrand: unique symbol;

export type Instant = number & { readonly [instantBrand]: true };
export type Day = string & { readonly [dayBrand]: true };
export type Month = string & { readonly [monthBrand]: true };
export type Period = { from: Day; until: Day };

/** @throws RangeError when it is not a whole number of milliseconds */
export function instant(value: number): Instant {
  if (!Number.isSafeInteger(value)) throw new RangeError(`${value} is not an instant`);
  return value as Instant;
}

/** @returns the day, or null when the text is no day of the calendar */
export function readDay(text: string): Day | null {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(text);
  if (!match) return null;
  const time = Date.UTC(Number(match[1]), Number(match[2]) - 1, Number(match[3]));
  return new Date(time).toISOString().slice(0, 10) === text ? (text as Day) : null;
}

/** @throws RangeError when the text is no day of the calendar */
export function day(text: string): Day {
  const found = readDay(text);
  if (!found) throw new RangeError(`${text} is not a day`);
  return found;
}

const dayFormats = new Map<string, Intl.DateTimeFormat>();

/** The day on which an instant falls in a zone (an IANA name). */
export function dayOf(at: Instant, zone: string): Day {
  let format = dayFormats.get(zone);
  if (!format) {
    format = new Intl.DateTimeFormat("en-CA", {
      timeZone: zone,
      year: "numeric",
      month: "2-digit",
      day: "2-digit",
    });
    dayFormats.set(zone, format);
  }
  return format.format(at) as Day;
}

const HALF_DAY_MS = 43_200_000;

/** An instant well within a day of a zone: for a record that knows its day and no hour. */
export function middayOf(of: Day, zone: string): Instant {
  const noon = Date.parse(`${of}T12:00:00Z`);
  // Zones lie up to 14 hours ahead of UTC and 12 behind: noon there, or the midnight before it, falls on the day.
  return dayOf(noon as Instant, zone) === of
    ? (noon as Instant)
    : ((noon - HALF_DAY_MS) as Instant);
}

/**
 * First instant of a day. Found by halving, because days of a zone may have 23 or 25 hours.
 */
export function startOfDay(of: Day, zone: string): Instant {
  let inside: number = middayOf(of, zone);
  let before = inside - 26 * 3_600_000;
  while (inside - before > 1) {
    const middle = Math.floor((before + inside) / 2);
    if (dayOf(middle as Instant, zone) === of) inside = middle;
    else before = middle;
  }
  return inside as Instant;
}

/** Does the runtime know this IANA zone? */
export function isZone(zone: string): boolean {
  try {
    new Intl.DateTimeFormat("en-CA", { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}

const MS_PER_DAY = 86_400_000;

export function addDays(start: Day, count: number): Day {
  return new Date(Date.parse(`${start}T00:00:00Z`) + count * MS_PER_DAY)
    .toISOString()
    .slice(0, 10) as Day;
}

/** Whole days from one day to another, negative when `to` is earlier. */
export function daysBetween(from: Day, to: Day): number {
  return Math.round((Date.parse(`${to}T00:00:00Z`) - Date.parse(`${from}T00:00:00Z`)) / MS_PER_DAY);
}

export function monthOf(of: Day): Month {
  return of.slice(0, 7) as Month;
}

export function firstDayOf(month: Month): Day {
  return `${month}-01` as Day;
}

export function nextMonth(month: Month): Month {
  const year = Number(month.slice(0, 4));
  const number = Number(month.slice(5, 7));
  return (
    number === 12 ? `${year + 1}-01` : `${month.slice(0, 4)}-${String(number + 1).padStart(2, "0")}`
  ) as Month;
}

/**
 * A period as whole months and the days left over at both ends, which is how totals are read: a year is
 * twelve rows of months instead of 365 of days.
 */
export function monthsAndDays(period: Period): {
  months: { from: Month; until: Month } | null;
  days: Period[];
} {
  if (period.from >= period.until) return { months: null, days: [] };
  const startMonth = monthOf(period.from);
  const first = period.from === firstDayOf(startMonth) ? startMonth : nextMonth(startMonth);
  const last = monthOf(period.until);
  if (first >= last) return { months: null, days: [period] };
  const days: Period[] = [];
  if (period.from < firstDayOf(first)) days.push({ from: period.from, until: firstDayOf(first) });
  if (firstDayOf(last) < period.until) days.push({ from: firstDayOf(last), until: period.until });
  return { months: { from: first, until: last }, days };
}

const MONTH_NAMES = [
  "January",
  "February",
  "March",
  "April",
  "May",
  "June",
  "July",
  "August",
  "September",
  "October",
  "November",
  "December",
] as const;

/** "6 May 2026" */
export function formatDay(of: Day): string {
  return `${Number(of.slice(8, 10))} ${formatMonth(monthOf(of))}`;
}

/** "May 2026" */
export function formatMonth(month: Month): string {
  return `${MONTH_NAMES[Number(month.slice(5, 7)) - 1] ?? ""} ${month.slice(0, 4)}`;
}

const clockFormats = new Map<string, Intl.DateTimeFormat>();

/** "14:05" in a zone. */
export function formatClock(at: Instant, zone: string): string {
  let format = clockFormats.get(zone);
  if (!format) {
    format = new Intl.DateTimeFormat("en-GB", {
      timeZone: zone,
      hour: "2-digit",
      minute: "2-digit",
      hourCycle: "h23",
    });
    clockFormats.set(zone, format);
  }
  return format.format(at);
}
