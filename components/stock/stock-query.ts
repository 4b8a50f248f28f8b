import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { stockEndpoint, type Stock, type StockFilter } from "@/lib/stock/contract/stock";

/** How often a page in sight asks again, besides whenever it comes back into sight. */
const AGAIN_MS = 20_000;

/** The stock by a filter: one object for the page's first answer and for every later one. */
export function stockQuery(filter: StockFilter) {
  return {
    queryKey: ["stock", filter.kind ?? "", filter.form ?? "", filter.wash ?? ""] as const,
    queryFn: ({ signal }: { signal: AbortSignal }): Promise<Stock> =>
      fetchEndpoint(stockEndpoint, filter, signal),
    refetchInterval: AGAIN_MS,
  };
}
