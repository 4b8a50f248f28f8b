import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { QueryProvider } from "@/components/forms/query-provider";
import { BagOnTable } from "@/components/sorting/bag-on-table";
import { readCode } from "@/lib/core/bag-code";
import { pageContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Sorting a bag" };

export default async function SortBagPage({ params }: PageProps<"/sorting/[code]">) {
  await pageContext("sorting.record");
  const reading = readCode((await params).code);
  if (!reading.ok) notFound();
  return (
    <QueryProvider>
      <BagOnTable code={reading.code} />
    </QueryProvider>
  );
}
