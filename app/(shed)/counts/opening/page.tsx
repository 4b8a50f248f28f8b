import type { Metadata } from "next";
import { OpeningForm } from "@/components/stock/opening-form";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { sentence } from "@/lib/core/messages";
import { dayOf, formatDay } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";

export const metadata: Metadata = { title: "Opening stock" };

export default async function OpeningPage() {
  const ctx = await pageContext("stock.opening");
  const { timeZone, firstDay } = requireScheme(ctx.db.reader);
  const today = dayOf(ctx.now, timeZone);
  return (
    <>
      <PageHeader
        title="Opening stock"
        lead={`What stood in the shed on ${formatDay(firstDay)}, container by container, by a signed count sheet.`}
        back={{ href: "/counts", label: "Counts" }}
      />
      {today === firstDay ? (
        <OpeningForm />
      ) : (
        <Notice tone="warn" title={`Possible on ${formatDay(firstDay)} only`}>
          {sentence("opening-refused")} What is found later is a count of its lot.
        </Notice>
      )}
    </>
  );
}
