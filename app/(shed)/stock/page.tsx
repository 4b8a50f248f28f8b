import { dehydrate, HydrationBoundary, QueryClient } from "@tanstack/react-query";
import type { Metadata } from "next";
import { QueryProvider } from "@/components/forms/query-provider";
import { stockQuery } from "@/components/stock/stock-query";
import { StockView } from "@/components/stock/stock-view";
import { pageContext } from "@/lib/http/page-context";
import { stockFilterSchema } from "@/lib/stock/contract/stock";
import { getStock } from "@/lib/stock/queries/stock";

export const metadata: Metadata = { title: "Stock" };

export default async function StockPage({ searchParams }: PageProps<"/stock">) {
  const ctx = await pageContext("stock.read");
  // An address that somebody mistyped shows everything rather than nothing.
  const filter = stockFilterSchema.catch({}).parse(await searchParams);
  const client = new QueryClient();
  client.setQueryData(stockQuery(filter).queryKey, getStock(ctx, filter));
  return (
    <QueryProvider>
      <HydrationBoundary state={dehydrate(client)}>
        <StockView first={filter} />
      </HydrationBoundary>
    </QueryProvider>
  );
}
