/** Day and clock as two fields, in the scheme's own time zone, whatever this device's clock is set to. */
import { dayOf, formatClock, instant, readDay, startOfDay, type Instant } from "@/lib/core/time";

export type WhenText = { day: string; clock: string };

/** "2026-05-06" and "14:05". */
export function whenText(at: Instant, zone: string): WhenText {
  return { day: dayOf(at, zone), clock: formatClock(at, zone) };
}

const MINUTE_MS = 60_000;
const minutesOf = (clock: string): number | null => {
  const found = /^([01]\d|2[0-3]):([0-5]\d)$/.exec(clock);
  return found ? Number(found[1]) * 60 + Number(found[2]) : null;
};

/**
 * @param before what it was: the same minute keeps its seconds
 * @returns null when it is no day or no clock
 */
export function readWhen({ day, clock }: WhenText, zone: string, before: Instant): Instant | null {
  const on = readDay(day);
  const minutes = minutesOf(clock);
  if (on === null || minutes === null) return null;
  const same = whenText(before, zone);
  if (same.day === day && same.clock === clock) return before;
  const first = instant(startOfDay(on, zone) + minutes * MINUTE_MS);
  // On the two days when clocks are changed the day does not have 24 hours.
  const shown = minutesOf(formatClock(first, zone));
  return shown === null ? first : instant(first + (minutes - shown) * MINUTE_MS);
}
