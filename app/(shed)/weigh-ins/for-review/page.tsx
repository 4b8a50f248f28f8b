import type { Metadata } from "next";
import { PageHeader } from "@/components/ui/page-header";
import { SecondReadings } from "@/components/weighing/second-readings";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { listForReview } from "@/lib/weighing/queries/stored";

export const metadata: Metadata = { title: "Second readings" };

export default async function SecondReadingsPage() {
  const ctx = await pageContext("weighing.review");
  return (
    <>
      <PageHeader
        title="Second readings"
        lead="These bags were weighed twice. Say which reading counts."
        back={{ href: "/today", label: "Back to today" }}
      />
      <SecondReadings
        readings={listForReview(ctx).readings}
        timeZone={requireScheme(ctx.db.reader).timeZone}
      />
    </>
  );
}
