/** Invariant: a report's address says all of it: the days, what it is broken down by, the page. */
import * as z from "zod";
import type { Period } from "@/lib/core/time";
import { GROUPINGS, type Grouping } from "../terms";
import { lastDayOf, readPeriod } from "./periods";

const textSchema = z.string().optional().catch(undefined);

const addressSchema = z.object({
  from: textSchema,
  to: textSchema,
  by: z.union([z.string(), z.array(z.string())]).optional(),
  page: z
    .string()
    .regex(/^[1-9]\d{0,5}$/)
    .transform(Number)
    .catch(1),
});

export type ReportQuery = {
  /** null: no days were asked for. */
  period: Period | null;
  /** Days were asked for that make no period. */
  wrongDays: boolean;
  by: Grouping[];
  page: number;
};

/**
 * Reads the query string of the report's page: `from` and `to` are first and last day, `by` may come several
 * times (tick boxes) or once with commas.
 */
export function readReportQuery(values: unknown): ReportQuery {
  const { from, to, by, page } = addressSchema.parse(values);
  const wanted = (Array.isArray(by) ? by : [by ?? ""]).flatMap((part) => part.split(","));
  const period = readPeriod(from, to);
  return {
    period,
    wrongDays: period === null && (from !== undefined || to !== undefined),
    by: GROUPINGS.filter((grouping) => wanted.includes(grouping)),
    page,
  };
}

/** The same as values of a link. */
export function reportValues(
  period: Period,
  by: readonly Grouping[],
  page = 1,
): Record<string, string> {
  return {
    from: period.from,
    to: lastDayOf(period),
    ...(by.length > 0 ? { by: by.join(",") } : {}),
    ...(page > 1 ? { page: String(page) } : {}),
  };
}
