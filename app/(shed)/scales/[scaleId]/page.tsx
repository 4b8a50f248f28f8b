import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { ScalePage } from "@/components/scales/scale-page";
import type { ScaleId } from "@/lib/core/ids";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { listUnconfirmed } from "@/lib/reports/queries/unconfirmed-readings";
import { listCheckWeights } from "@/lib/scales/queries/check-weights";
import { getScaleHistory, listScalesToday } from "@/lib/scales/queries/checks";

export const metadata: Metadata = { title: "Scale" };

export default async function OneScalePage({
  params,
  searchParams,
}: PageProps<"/scales/[scaleId]">) {
  const ctx = await pageContext("scales.read");
  const scaleId = (await params).scaleId as ScaleId;
  const { weight } = await searchParams;
  const history = getScaleHistory(ctx, scaleId);
  if (!history) notFound();
  const mayClear = may(ctx, "scales.clear");
  return (
    <ScalePage
      history={history}
      weights={listCheckWeights(ctx).items}
      others={listScalesToday(ctx).items.filter((other) => other.scaleId !== scaleId)}
      unconfirmed={mayClear ? listUnconfirmed(ctx, scaleId) : null}
      drawnWeight={typeof weight === "string" ? weight : undefined}
      timeZone={requireScheme(ctx.db.reader).timeZone}
    />
  );
}
