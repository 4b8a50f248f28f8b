import type { Metadata } from "next";
import { TakeAwayScreen } from "@/components/removals/take-away-screen";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { requirePerson } from "@/lib/platform/context";
import { findLotToTake } from "@/lib/removals/queries/lot-to-take";
import { getRemovalLists } from "@/lib/removals/queries/removal-lists";

export const metadata: Metadata = { title: "Take away" };

export default async function TakeAwayPage({ searchParams }: PageProps<"/removals/new">) {
  const ctx = await pageContext("removals.record");
  const { from, lot } = await searchParams;
  const number = typeof lot === "string" ? Number(lot) : NaN;
  const found = Number.isSafeInteger(number) ? findLotToTake(ctx, number) : null;
  return (
    <>
      <PageHeader
        title="Take away"
        back={{ href: "/removals", label: "Back to what was taken away" }}
      />
      <TakeAwayScreen
        helperId={requirePerson(ctx)}
        lists={getRemovalLists(ctx)}
        lot={from === "stock" || found ? found : undefined}
      />
    </>
  );
}
