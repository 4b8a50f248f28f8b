import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { LotPage } from "@/components/stock/lot-page";
import { dayOf, daysBetween, instant } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { lotMovementsEndpoint } from "@/lib/stock/contract/lots";
import { listLotCounts } from "@/lib/stock/queries/counts";
import { listLotMovements } from "@/lib/stock/queries/lot-movements";
import { getLot } from "@/lib/stock/queries/lots";
import { listLotMoves } from "@/lib/stock/queries/moves";

export const metadata: Metadata = { title: "Lot" };

export default async function LotRoute({
  params,
  searchParams,
}: PageProps<"/stock/lots/[number]">) {
  const ctx = await pageContext("stock.read");
  const wanted = lotMovementsEndpoint.input.safeParse({
    ...(await params),
    before: (await searchParams).before,
  });
  if (!wanted.success) notFound();
  const lot = getLot(ctx, wanted.data.number);
  if (!lot) notFound();
  const { timeZone } = requireScheme(ctx.db.reader);
  return (
    <LotPage
      lot={lot}
      movements={listLotMovements(ctx, wanted.data)}
      counts={listLotCounts(ctx, lot.number)}
      moves={listLotMoves(ctx, lot.number)}
      timeZone={timeZone}
      ageDays={daysBetween(dayOf(instant(lot.openedAt), timeZone), dayOf(ctx.now, timeZone))}
      mayEdit={may(ctx, "stock.edit")}
      may={{
        count: may(ctx, "stock.count"),
        identify: may(ctx, "stock.identify"),
        move: may(ctx, "stock.move"),
        step: may(ctx, "steps.record"),
        remove: may(ctx, "removals.record"),
        correct: may(ctx, "stock.review"),
      }}
      helperId={requirePerson(ctx)}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
