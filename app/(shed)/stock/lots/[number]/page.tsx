import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { LotPage } from "@/components/stock/lot-page";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { lotMovementsEndpoint } from "@/lib/stock/contract/lots";
import { listLotMovements } from "@/lib/stock/queries/lot-movements";
import { getLot } from "@/lib/stock/queries/lots";

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
  return (
    <LotPage
      lot={lot}
      movements={listLotMovements(ctx, wanted.data)}
      timeZone={requireScheme(ctx.db.reader).timeZone}
      mayEdit={may(ctx, "stock.edit")}
    />
  );
}
