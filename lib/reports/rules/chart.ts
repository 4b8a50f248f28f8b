/** Invariant: the bars of a chart add up to what its period's report counts as accepted. */
import {
  addDays,
  daysBetween,
  firstDayOf,
  monthOf,
  nextMonth,
  type Day,
  type Period,
} from "@/lib/core/time";

export type Bin = { from: Day; until: Day };

/** Up to this many days a chart counts by week, beyond it by month. */
const MOST_DAYS_BY_WEEK = 95;

/**
 * Cuts a period into weeks (of seven days from its first day; the last may be shorter) or calendar months.
 */
export function binsOf(period: Period): { unit: "week" | "month"; bins: Bin[] } {
  const unit = daysBetween(period.from, period.until) <= MOST_DAYS_BY_WEEK ? "week" : "month";
  const bins: Bin[] = [];
  for (let from = period.from; from < period.until;) {
    const next = unit === "week" ? addDays(from, 7) : firstDayOf(nextMonth(monthOf(from)));
    const until = next < period.until ? next : period.until;
    bins.push({ from, until });
    from = until;
  }
  return { unit, bins };
}

export type Stack<Key> = { key: Key; heights: number[] };

/**
 * Keeps the `most` largest series and adds the others up into one.
 *
 * @param stacks one series each, heights by bin
 */
export function largestStacks<Key>(
  stacks: readonly Stack<Key>[],
  most: number,
  rest: Key,
): Stack<Key>[] {
  const total = (stack: Stack<Key>) => stack.heights.reduce((sum, height) => sum + height, 0);
  const sorted = [...stacks].sort((a, b) => total(b) - total(a));
  if (sorted.length <= most) return sorted;
  const kept = sorted.slice(0, most - 1);
  const others = sorted.slice(most - 1);
  const heights = others[0]?.heights.map((_, bin) =>
    others.reduce((sum, stack) => sum + (stack.heights[bin] ?? 0), 0),
  );
  return [...kept, { key: rest, heights: heights ?? [] }];
}
