import type { Metadata } from "next";
import { IdentifyGuide } from "@/components/stock/identify-guide";
import { NotSureLots } from "@/components/stock/not-sure-lots";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { listLots } from "@/lib/stock/queries/lots";

export const metadata: Metadata = { title: "Not sure" };

export default async function NotSurePage() {
  const ctx = await pageContext("stock.read");
  const { lots } = listLots(ctx, { state: "held", polymer: "not-sure" });
  return (
    <>
      <PageHeader
        title="Not sure"
        lead="Plastic that nobody could name. It can never be heated until somebody has found out."
        back={{ href: "/stock", label: "Back to stock" }}
      />
      <NotSureLots lots={lots} mayIdentify={may(ctx, "stock.identify")} />
      <IdentifyGuide />
    </>
  );
}
