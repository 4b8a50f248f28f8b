/** Reports: the mass balance and the movements, as CSV, with the description that goes with them. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { daySchema } from "@/lib/core/schemas";
import { daysBetween } from "@/lib/core/time";
import { GROUPINGS, type Grouping } from "./terms";

/** The longest period that one report covers, in days: fifty years. */
const LONGEST_DAYS = 18_300;

const period = {
  /** First day. */
  from: daySchema,
  /** First day after the period. */
  until: daySchema,
};

function isPeriod(input: { from: z.output<typeof daySchema>; until: z.output<typeof daySchema> }) {
  return input.from < input.until && daysBetween(input.from, input.until) <= LONGEST_DAYS;
}

/** "month,point"; the order of the columns is fixed, whatever the order here. */
export const groupingSchema = z
  .string()
  .default("")
  .transform((text, check): Grouping[] => {
    const wanted = text.split(",").filter((part) => part !== "");
    const unknown = wanted.some((part) => !GROUPINGS.some((grouping) => grouping === part));
    if (unknown) {
      check.addIssue({ code: "custom", message: "invalid" });
      return z.NEVER;
    }
    return GROUPINGS.filter((grouping) => wanted.includes(grouping));
  });

export const balanceInputSchema = z
  .object({ ...period, by: groupingSchema })
  .refine(isPeriod, { error: "period-invalid", path: ["until"] });
export type BalanceInput = z.output<typeof balanceInputSchema>;

export const movementsInputSchema = z
  .object(period)
  .refine(isPeriod, { error: "period-invalid", path: ["until"] });
export type MovementsInput = z.output<typeof movementsInputSchema>;

export const balanceCsvEndpoint = endpoint({
  method: "GET",
  path: "/api/reports/balance.csv",
  summary:
    "The mass balance of a period by any of month, point, polymer, kind and colour: one row each, kilograms and grams. RFC 4180, UTF-8; balance.csv-metadata.json describes it.",
  permission: "reports.export",
  input: balanceInputSchema,
  output: z.string(),
  produces: "text/csv; charset=utf-8; header=present",
});

export const balanceMetadataEndpoint = endpoint({
  method: "GET",
  path: "/api/reports/balance.csv-metadata.json",
  summary:
    "W3C CSVW description of balance.csv: its period, the definition of each column, and the ledger's last entry and hash.",
  permission: "reports.export",
  input: balanceInputSchema,
  output: z.record(z.string(), z.unknown()),
  produces: "application/csvm+json",
});

export const movementsCsvEndpoint = endpoint({
  method: "GET",
  path: "/api/reports/movements.csv",
  summary:
    "Every ledger line booked in a period, in order of entry, up to the last entry when the export began. RFC 4180, UTF-8.",
  permission: "reports.export",
  input: movementsInputSchema,
  output: z.string(),
  produces: "text/csv; charset=utf-8; header=present",
});
