/** What sorting put into lots, by week or month and polymer. */
import "server-only";
import { daysBetween, monthOf, type Day, type Period } from "@/lib/core/time";
import { POLYMERS, type PolymerAnswer } from "@/lib/core/plastics";
import { prepared, type Readable } from "@/lib/platform/database";
import { binsOf, largestStacks, type Bin, type Stack } from "../rules/chart";
import { listBalance } from "./balance";

/** null: the smaller ones together. */
export type ChartKey = PolymerAnswer | null;
export type Chart = { unit: "week" | "month"; bins: Bin[]; stacks: Stack<ChartKey>[] };

const MOST_STACKS = 6;

type Cell = { bin: number; polymer: PolymerAnswer; grams: number };

/** A period of at most some fourteen weeks is read by day; a longer one from the months. */
function cellsOf(
  db: Readable,
  period: Period,
  today: Day,
  bins: readonly Bin[],
  weekly: boolean,
): Cell[] {
  if (weekly) {
    const found = prepared(
      db.client,
      `select t.day, r.polymer, sum(t.accepted) as grams
         from totals_day t join "rows" r on r.id = t.row_id
        where t.day >= ? and t.day < ? and r.polymer is not null
        group by t.day, r.polymer`,
    ).all(period.from, period.until) as { day: Day; polymer: PolymerAnswer; grams: number }[];
    return found.map(({ day, polymer, grams }) => ({
      bin: Math.floor(daysBetween(period.from, day) / 7),
      polymer,
      grams,
    }));
  }
  const binOf = new Map(bins.map((bin, at) => [monthOf(bin.from), at]));
  return listBalance(db, period, ["month", "polymer"], today).flatMap(
    ({ month, polymer, figures }) => {
      const bin = month === null ? undefined : binOf.get(month);
      if (bin === undefined || polymer === null || polymer === "unsorted" || polymer === "reject")
        return [];
      return [{ bin, polymer, grams: figures.accepted }];
    },
  );
}

/** Stacks from the largest polymer on; a negative week (more was turned away later) counts as none. */
export function readChart(db: Readable, period: Period, today: Day): Chart {
  const { unit, bins } = binsOf(period);
  const stacks = new Map<PolymerAnswer, number[]>();
  for (const { bin, polymer, grams } of cellsOf(db, period, today, bins, unit === "week")) {
    const heights = stacks.get(polymer) ?? bins.map(() => 0);
    stacks.set(polymer, heights);
    heights[bin] = Math.max(0, (heights[bin] ?? 0) + grams);
  }
  const inOrder = [...POLYMERS, "mixed" as const, "not-sure" as const].flatMap((key) => {
    const heights = stacks.get(key);
    return heights?.some((height) => height > 0) ? [{ key, heights }] : [];
  });
  return { unit, bins, stacks: largestStacks<ChartKey>(inOrder, MOST_STACKS, null) };
}
