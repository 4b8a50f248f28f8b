import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addDays,
  day,
  dayOf,
  daysBetween,
  firstDayOf,
  formatClock,
  formatDay,
  formatMonth,
  instant,
  isZone,
  monthOf,
  monthsAndDays,
  nextMonth,
  readDay,
  startOfDay,
  type Day,
  type Instant,
} from "@/lib/core/time";

const FIRST = day("2019-01-01");
const anyDay = fc.integer({ min: 0, max: 6000 }).map((count) => addDays(FIRST, count));
const at = (iso: string) => instant(Date.parse(iso));

/** Every day of a period, one by one. */
function listed(from: Day, until: Day): Day[] {
  const days: Day[] = [];
  for (let current = from; current < until; current = addDays(current, 1)) days.push(current);
  return days;
}

describe("a day", () => {
  it.each([
    "2026-02-29",
    "2026-13-01",
    "2026-00-10",
    "2026-04-31",
    "2026-1-1",
    "20260101",
    "",
    "2026-01-01T00:00",
  ])("%s is none", (text) => {
    expect(readDay(text)).toBeNull();
    expect(() => day(text)).toThrow(RangeError);
  });

  it("exists in leap years where it should", () => {
    expect(readDay("2024-02-29")).toBe("2024-02-29");
    expect(readDay("2000-02-29")).toBe("2000-02-29");
    expect(readDay("1900-02-29")).toBeNull();
  });

  it("counts forth and back", () => {
    expect(addDays(day("2024-02-28"), 2)).toBe("2024-03-01");
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -3000, max: 3000 }), (start, count) => {
        expect(daysBetween(start, addDays(start, count)) + 0).toBe(count + 0);
        expect(addDays(addDays(start, count), -count)).toBe(start);
        expect(addDays(start, count) > start).toBe(count > 0);
      }),
    );
  });

  it("is that of the scheme's own zone", () => {
    expect(dayOf(at("2026-06-30T23:30:00Z"), "UTC")).toBe("2026-06-30");
    expect(dayOf(at("2026-06-30T23:30:00Z"), "Europe/London")).toBe("2026-07-01");
    expect(dayOf(at("2026-06-30T23:30:00Z"), "America/New_York")).toBe("2026-06-30");
    expect(dayOf(at("2026-06-30T10:30:00Z"), "Pacific/Auckland")).toBe("2026-06-30");
    expect(dayOf(at("2026-06-30T12:30:00Z"), "Pacific/Auckland")).toBe("2026-07-01");
  });

  it("has 23 or 25 hours when the clocks change", () => {
    // European Union, 2026: forward on 29 March at 01:00 UTC, back on 25 October at 01:00 UTC.
    const hours = (from: string, until: string, zone: string, of: string) => {
      let count = 0;
      for (let time = Date.parse(from); time < Date.parse(until); time += 3_600_000) {
        if (dayOf(instant(time), zone) === of) count += 1;
      }
      return count;
    };
    expect(hours("2026-03-28T00:00Z", "2026-03-31T00:00Z", "Europe/Berlin", "2026-03-29")).toBe(23);
    expect(hours("2026-10-24T00:00Z", "2026-10-27T00:00Z", "Europe/Berlin", "2026-10-25")).toBe(25);
    expect(hours("2026-05-01T00:00Z", "2026-05-04T00:00Z", "Europe/Berlin", "2026-05-02")).toBe(24);
    expect(dayOf(at("2026-03-28T23:00:00Z"), "Europe/Berlin")).toBe("2026-03-29");
    expect(dayOf(at("2026-03-29T21:59:59.999Z"), "Europe/Berlin")).toBe("2026-03-29");
    expect(dayOf(at("2026-03-29T22:00:00Z"), "Europe/Berlin")).toBe("2026-03-30");
    expect(formatClock(at("2026-03-29T00:59:00Z"), "Europe/Berlin")).toBe("01:59");
    expect(formatClock(at("2026-03-29T01:00:00Z"), "Europe/Berlin")).toBe("03:00");
    // A zone that changes at midnight itself: the day begins at 01:00.
    expect(formatClock(at("2018-11-04T03:00:00Z"), "America/Sao_Paulo")).toBe("01:00");
    expect(dayOf(at("2018-11-04T03:00:00Z"), "America/Sao_Paulo")).toBe("2018-11-04");
    expect(dayOf(at("2018-11-04T02:59:59Z"), "America/Sao_Paulo")).toBe("2018-11-03");
  });
});

describe("months and days of a period", () => {
  it("cover it exactly: nothing twice, nothing left out, whole months only", () => {
    fc.assert(
      fc.property(anyDay, fc.integer({ min: -5, max: 900 }), (from, length) => {
        const until = addDays(from, length);
        const { months, days } = monthsAndDays({ from, until });
        const covered = days.flatMap((part) => listed(part.from, part.until));
        if (months) {
          expect(months.from < months.until).toBe(true);
          covered.push(...listed(firstDayOf(months.from), firstDayOf(months.until)));
        }
        expect(covered.sort()).toEqual(listed(from, until));
        expect(days.length).toBeLessThanOrEqual(2);
        // A whole month is never left to days.
        for (const part of days) expect(daysBetween(part.from, part.until)).toBeLessThan(62);
        for (const part of days.filter((one) => one.from === firstDayOf(monthOf(one.from)))) {
          expect(part.until < firstDayOf(nextMonth(monthOf(part.from)))).toBe(true);
        }
      }),
      { numRuns: 500 },
    );
  });

  it.each([
    ["2026-01-01", "2027-01-01", { from: "2026-01", until: "2027-01" }, []],
    ["2026-01-01", "2026-02-01", { from: "2026-01", until: "2026-02" }, []],
    ["2026-01-02", "2026-02-01", null, [["2026-01-02", "2026-02-01"]]],
    [
      "2025-12-31",
      "2026-02-02",
      { from: "2026-01", until: "2026-02" },
      [
        ["2025-12-31", "2026-01-01"],
        ["2026-02-01", "2026-02-02"],
      ],
    ],
    ["2026-05-05", "2026-05-05", null, []],
  ])("%s to %s", (from, until, months, days) => {
    const found = monthsAndDays({ from: day(from), until: day(until) });
    expect(found.months).toEqual(months);
    expect(found.days.map((part) => [part.from, part.until])).toEqual(days);
  });

  it("go on after December", () => {
    expect(nextMonth(monthOf(day("2026-12-31")))).toBe("2027-01");
    expect(nextMonth(monthOf(day("2026-01-31")))).toBe("2026-02");
    expect(nextMonth(monthOf(day("2026-09-01")))).toBe("2026-10");
  });
});

describe("showing time", () => {
  it("writes days and months out", () => {
    expect(formatDay(day("2026-05-06"))).toBe("6 May 2026");
    expect(formatMonth(monthOf(day("2026-12-06")))).toBe("December 2026");
  });

  it("shows the clock of the zone, midnight as 00:00", () => {
    expect(formatClock(at("2026-05-06T12:05:00Z"), "Europe/London")).toBe("13:05");
    expect(formatClock(at("2026-12-06T00:00:00Z"), "Europe/London")).toBe("00:00");
  });

  it("knows zones", () => {
    expect(isZone("Europe/London")).toBe(true);
    expect(isZone("Estuary/Saltmarsh")).toBe(false);
  });

  it("takes whole milliseconds only", () => {
    expect(() => instant(0.5)).toThrow(RangeError);
    expect(() => instant(NaN)).toThrow(RangeError);
  });

  it("finds the first instant of the day, also where the clock changes", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: Date.UTC(2026, 0, 1), max: Date.UTC(2027, 0, 1) }),
        fc.constantFrom("UTC", "Europe/London", "Australia/Lord_Howe", "America/St_Johns"),
        (at, zone) => {
          const start = startOfDay(dayOf(at as Instant, zone), zone);
          expect(start).toBeLessThanOrEqual(at);
          expect(dayOf(start, zone)).toBe(dayOf(at as Instant, zone));
          expect(dayOf((start - 1) as Instant, zone)).not.toBe(dayOf(at as Instant, zone));
        },
      ),
    );
    // 25 October 2026: the day has 25 hours in London and begins at 23:00 UTC of the 24th.
    expect(startOfDay(day("2026-10-25"), "Europe/London")).toBe(Date.UTC(2026, 9, 24, 23));
  });
});
