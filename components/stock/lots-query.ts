import type * as z from "zod";
import type { lotsPageSchema } from "@/lib/stock/contract/lots";

const FILTERS = ["polymer", "colour", "kind", "form", "wash", "container"] as const;

/** What is searched for as the address says it, and how many filters besides the search are set. */
export function queryOf(wanted: z.output<typeof lotsPageSchema>): {
  values: Record<string, string>;
  set: number;
} {
  const values: Record<string, string> = {};
  for (const name of ["q", "state", ...FILTERS] as const) {
    const value = wanted[name];
    if (value !== undefined) values[name] = value;
  }
  return { values, set: FILTERS.filter((name) => wanted[name] !== undefined).length };
}
