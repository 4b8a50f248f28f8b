/** A report of any days, put together from stored months and ragged ends in days, as ledger.md says. */
import { expect } from "vitest";
import { heldBefore, resortedBetween, type Totals } from "@/tests/support/plain-model/totals";
import { read } from "./comparison";
import type { World } from "./world";

/** Everything that makes a row's closing differ from its opening, the sources with their sign turned. */
const RESORTED = `held - collected - other_in - opening + disposed + passed_proven + passed_unproven
  + loss + difference + pieces + before_opening`;

/** First month that begins on or after a day. */
function firstWholeMonth(day: string): string {
  if (day.endsWith("-01")) return day.slice(0, 7);
  const [year = 0, month = 0] = day.split("-").map(Number);
  return new Date(Date.UTC(year, month, 1)).toISOString().slice(0, 7);
}

/** Sum of an expression over booked days [from, until) by row and origin. */
function summed(world: World, expression: string, from: string, until: string): Totals {
  const months = [firstWholeMonth(from), until.slice(0, 7)] as const;
  const rows = read(
    world,
    `select row_id || '|' || origin_no as name, sum(amount) as grams from (
       select row_id, origin_no, ${expression} as amount from totals_month where month >= ? and month < ?
       union all
       select row_id, origin_no, ${expression} from totals_day
       where day >= ? and day < ? and not (substr(day, 1, 7) >= ? and substr(day, 1, 7) < ?)
     ) group by name having sum(amount) <> 0`,
    ...months,
    from,
    until,
    ...months,
  );
  return new Map(rows.map((row) => [String(row.name), Number(row.grams)]));
}

const plain = (totals: Totals) => Object.fromEntries([...totals].sort());

/** Fails unless opening, closing and "re-sorted" of every row are the plain model's, and all re-sorted is zero. */
export function expectRowsClose(world: World, from: string, until: string): void {
  const opening = summed(world, "held", "2000-01-01", from);
  const held = summed(world, "held", from, until);
  const resorted = summed(world, RESORTED, from, until);
  const closing = new Map(opening);
  for (const [name, grams] of held) closing.set(name, (closing.get(name) ?? 0) + grams);
  for (const [name, grams] of closing) if (grams === 0) closing.delete(name);

  expect(plain(opening), `opening on ${from}`).toEqual(plain(heldBefore(world.book, from)));
  expect(plain(closing), `closing before ${until}`).toEqual(plain(heldBefore(world.book, until)));
  expect(plain(resorted), `re-sorted from ${from} until ${until}`).toEqual(
    plain(resortedBetween(world.book, from, until)),
  );
  const all = [...resorted.values()].reduce((sum, grams) => sum + grams, 0);
  expect(all, `all re-sorted from ${from} until ${until}`).toBe(0);
}
