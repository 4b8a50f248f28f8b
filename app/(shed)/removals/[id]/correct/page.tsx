import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { CorrectScreen } from "@/components/removals/correct-screen";
import { draftOf } from "@/components/removals/removal-draft";
import { PageHeader } from "@/components/ui/page-header";
import { dayOf } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { findLotToTake } from "@/lib/removals/queries/lot-to-take";
import { getRemovalLists } from "@/lib/removals/queries/removal-lists";
import { getRemoval } from "@/lib/removals/queries/removal-page";

export const metadata: Metadata = { title: "Correct a removal" };

export default async function CorrectRemovalPage({ params }: PageProps<"/removals/[id]/correct">) {
  const ctx = await pageContext("removals.record");
  const removal = getRemoval(ctx, (await params).id);
  if (removal?.state !== "posted") notFound();
  const lots = removal.lots.flatMap(({ number, grams }) => {
    const lot = findLotToTake(ctx, number);
    // As if the wrong one had not been; a difference can be told apart only where there is one lot.
    const missing = removal.lots.length === 1 ? removal.differenceGrams : 0;
    return lot ? [{ lot: { ...lot, heldGrams: lot.heldGrams + grams + missing }, grams }] : [];
  });
  const { timeZone } = requireScheme(ctx.db.reader);
  return (
    <>
      <PageHeader
        title="Correct a removal"
        lead="Both stay in the history. What its places no longer hold is settled as difference."
        back={{ href: `/removals/${removal.id}`, label: "Back to the removal" }}
      />
      <CorrectScreen
        removalId={removal.id}
        first={draftOf(removal, lots, dayOf(removal.occurredAt, timeZone))}
        lists={getRemovalLists(ctx, removal)}
        receiptNumber={removal.receipts.find(({ state }) => state === "posted")?.number ?? null}
      />
    </>
  );
}
