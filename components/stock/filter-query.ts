import type { StockFilter } from "@/lib/stock/contract/stock";

type Filter = StockFilter & { polymer?: string; colour?: string };

/** What is filtered, without what is left at "all". */
export function filterValues(filter: Filter): Record<string, string> {
  const values: Record<string, string> = {};
  for (const name of ["polymer", "colour", "kind", "form", "wash"] as const) {
    const value = filter[name];
    if (value !== undefined) values[name] = value;
  }
  return values;
}

/** "?kind=lids&form=flake", or "" when nothing is filtered. */
export function filterQuery(filter: Filter): string {
  const query = new URLSearchParams(filterValues(filter)).toString();
  return query === "" ? "" : `?${query}`;
}
