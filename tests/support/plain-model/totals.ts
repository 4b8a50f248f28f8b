/** The plain model's own totals, each the sum of a filtered list. */
import { IN_THE_SHED, type Account } from "@/lib/ledger/terms";
import type { Book, Movement } from "./movements";

export const COLUMNS = [
  "held",
  "collected",
  "other_in",
  "opening",
  "disposed",
  "passed_proven",
  "passed_unproven",
  "loss",
  "difference",
  "pieces",
  "accepted",
  "rejected",
  "bags",
  "before_opening",
] as const;
export type Column = (typeof COLUMNS)[number];

/** The column that a movement counts in; sources enter with their sign turned. */
function columnOf(book: Book, move: Movement): [Column, 1 | -1] {
  if ((IN_THE_SHED as readonly Account[]).includes(move.account)) return ["held", 1];
  switch (move.account) {
    case "source":
      return [book.naming.typeOf(move.key) === "donated" ? "collected" : "other_in", -1];
    case "opening":
      return ["opening", -1];
    case "passed-on":
      return [move.cause === "proven" ? "passed_proven" : "passed_unproven", 1];
    case "before-opening":
      return ["before_opening", 1];
    case "disposed":
    case "loss":
    case "difference":
    case "pieces":
      return [move.account, 1];
    default:
      throw new Error(`${move.account} has no column`);
  }
}

/** "day|row|origin|column" (or month) → grams, none at zero. */
export type Totals = Map<string, number>;

function add(totals: Totals, key: string, grams: number): void {
  const sum = (totals.get(key) ?? 0) + grams;
  if (sum === 0) totals.delete(key);
  else totals.set(key, sum);
}

/** Totals by day (10 letters of a date), by month (7) or over all time (0). */
export function totalsBy(book: Book, letters: 10 | 7): Totals {
  const totals: Totals = new Map();
  for (const move of book.movements) {
    if (move.dim !== "O") continue;
    const [column, sign] = columnOf(book, move);
    const row = book.naming.rowOf(move.material);
    add(totals, `${move.day.slice(0, letters)}|${row}|${move.key}|${column}`, sign * move.grams);
  }
  for (const { day, material, origin, column, grams } of book.figures) {
    const row = book.naming.rowOf(material);
    add(totals, `${day.slice(0, letters)}|${row}|${origin}|${column}`, grams);
  }
  return totals;
}

/** "month|measure|basis|scale" → grams and permissible error, none at zero. */
export function scaleTotals(book: Book): Map<string, string> {
  const found = new Map<string, { grams: number; mpe: number }>();
  for (const { day, measure, basis, scale, grams, mpe } of book.readings) {
    const key = `${day.slice(0, 7)}|${measure}|${basis}|${scale}`;
    const sum = found.get(key) ?? { grams: 0, mpe: 0 };
    found.set(key, { grams: sum.grams + grams, mpe: sum.mpe + mpe });
  }
  return new Map(
    [...found]
      .filter(([, sum]) => sum.grams !== 0 || sum.mpe !== 0)
      .map(([key, sum]) => [key, `${sum.grams} g ± ${sum.mpe} mg`]),
  );
}

/**
 * What entered a report's row from other rows on days [from, until): the sum of everything that moved in
 * that row, inside and outside the shed. "row|origin" → grams, none at zero.
 */
export function resortedBetween(book: Book, from: string, until: string): Totals {
  const totals: Totals = new Map();
  for (const move of book.movements) {
    if (move.dim !== "O" || move.day < from || move.day >= until) continue;
    add(totals, `${book.naming.rowOf(move.material)}|${move.key}`, move.grams);
  }
  return totals;
}

/** In the shed at the start of a day, by "row|origin", none at zero. */
export function heldBefore(book: Book, day: string): Totals {
  const totals: Totals = new Map();
  for (const move of book.movements) {
    if (move.dim !== "O" || move.day >= day) continue;
    if (columnOf(book, move)[0] !== "held") continue;
    add(totals, `${book.naming.rowOf(move.material)}|${move.key}`, move.grams);
  }
  return totals;
}
