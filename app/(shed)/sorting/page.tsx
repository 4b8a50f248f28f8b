import type { Metadata } from "next";
import { QueryProvider } from "@/components/forms/query-provider";
import { WaitingBags } from "@/components/sorting/waiting-bags";
import { pageContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Sorting" };

/** The page holds nobody's data: its lists come from handlers, so that it can be kept on a shared phone. */
export default async function SortingPage() {
  await pageContext("sorting.record");
  return (
    <QueryProvider>
      <WaitingBags />
    </QueryProvider>
  );
}
