import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { OtherLabel } from "@/components/bags/other-label";
import { PublicBagCard } from "@/components/bags/public-bag";
import { getPublicLabel } from "@/lib/bags/queries";
import { formatCode, readCode } from "@/lib/core/bag-code";
import { dayOf, formatDay } from "@/lib/core/time";
import { publicContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { findLotByLabel } from "@/lib/stock/queries/lot-label";

type Props = { params: Promise<{ code: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const reading = readCode((await params).code);
  return {
    title: reading.ok ? `Tag ${formatCode(reading.code)}` : "Unknown tag",
    robots: { index: false },
  };
}

/** Both /b/CODE and /B/CODE lead here; whoever works in the shed and scans a lot's label comes to the lot. A code that opens nothing gets its own sentence in not-found.tsx. */
export default async function TagPage({ params }: Props) {
  const ctx = await publicContext();
  const reading = readCode((await params).code);
  const label = reading.ok ? getPublicLabel(ctx, reading.code) : null;
  if (!reading.ok || !label) notFound();
  if (may(ctx, "stock.read")) {
    const lot = findLotByLabel(ctx.db.reader, reading.code);
    if (lot) redirect(`/stock/lots/${lot.number}`);
  }
  if (label.kind !== "bag") return <OtherLabel code={reading.code} kind={label.kind} />;
  const { timeZone } = requireScheme(ctx.db.reader);
  return <PublicBagCard bag={label.bag} since={formatDay(dayOf(label.bag.stateSince, timeZone))} />;
}
