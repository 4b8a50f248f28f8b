import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { QueryProvider } from "@/components/forms/query-provider";
import { SortingSession } from "@/components/sorting/sorting-session";
import { readCode } from "@/lib/core/bag-code";
import { isUuidV7 } from "@/lib/core/ids";
import { pageContext } from "@/lib/http/page-context";
import { MOST_BAGS } from "@/lib/sorting/terms";

export const metadata: Metadata = { title: "Sorting" };

/** A session under way; `?bags=K7Q29F4M.…` starts a new one with these bags. The page holds nobody's data. */
export default async function SortingTablePage({
  params,
  searchParams,
}: PageProps<"/sorting/table/[id]">) {
  await pageContext("sorting.record");
  const { id } = await params;
  if (!isUuidV7(id)) notFound();
  const { bags } = await searchParams;
  const first = (typeof bags === "string" ? bags.split(".") : [])
    .slice(0, MOST_BAGS)
    .flatMap((text) => {
      const reading = readCode(text);
      return reading.ok ? [reading.code] : [];
    });
  return (
    <QueryProvider>
      <SortingSession key={id} id={id} first={first} />
    </QueryProvider>
  );
}
