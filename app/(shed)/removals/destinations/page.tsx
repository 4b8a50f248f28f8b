import type { Metadata } from "next";
import { DestinationsManager } from "@/components/removals/destinations-manager";
import { PageHeader } from "@/components/ui/page-header";
import { dayOf } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { listManagedDestinations } from "@/lib/removals/queries/destinations";

export const metadata: Metadata = { title: "Destinations" };

export default async function DestinationsPage() {
  const ctx = await pageContext("removals.manage");
  return (
    <>
      <PageHeader
        title="Destinations"
        lead="Who takes what leaves the shed. A change counts for removals from now on."
        back={{ href: "/removals", label: "Back to what was taken away" }}
      />
      <DestinationsManager
        destinations={listManagedDestinations(ctx)}
        today={dayOf(ctx.now, requireScheme(ctx.db.reader).timeZone)}
      />
    </>
  );
}
