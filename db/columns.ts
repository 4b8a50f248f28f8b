/** Column makers, so that one thing has one type everywhere. */
import { check, integer, text, type AnySQLiteColumn } from "drizzle-orm/sqlite-core";
import { sql, type SQL } from "drizzle-orm";
import type { Id } from "@/lib/core/ids";
import type { Day, Instant, Month } from "@/lib/core/time";

/** A UUIDv7 made by the client or by the command. */
export const idColumn = <Noun extends string>(name: string) => text(name).$type<Id<Noun>>();
/** Whole grams; the sign is checked per table. */
export const gramsColumn = (name: string) => integer(name).$type<number>();
/** A scale's reading: whole milligrams. */
export const milligramsColumn = (name: string) => integer(name).$type<number>();
/** Epoch milliseconds. */
export const instantColumn = (name: string) => integer(name).$type<Instant>();
/** YYYY-MM-DD in the scheme's zone. */
export const dayColumn = (name: string) => text(name).$type<Day>();
/** YYYY-MM in the scheme's zone. */
export const monthColumn = (name: string) => text(name).$type<Month>();

/**
 * SQLite stores what it is given; this CHECK makes an integer column refuse text and fractions.
 * NULL passes: NOT NULL is the column's own business.
 */
export function wholeNumbers(name: string, ...columns: AnySQLiteColumn[]) {
  const tests = columns.map((column): SQL => sql`typeof(${column}) in ('integer', 'null')`);
  return check(name, sql.join(tests, sql` and `));
}

/** A CHECK that a text column holds one of a closed list. */
export function oneOf(name: string, column: AnySQLiteColumn, values: readonly string[]) {
  const list = values.map((value) => `'${value}'`).join(", ");
  return check(name, sql`${column} in (${sql.raw(list)})`);
}
