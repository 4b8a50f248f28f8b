import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { LotList } from "@/components/stock/lot-list";
import { LotsFilter } from "@/components/stock/lots-filter";
import { LotsFoot } from "@/components/stock/lots-foot";
import { queryOf } from "@/components/stock/lots-query";
import { PageHeader } from "@/components/ui/page-header";
import { readScan } from "@/lib/core/bag-code";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { listContainers } from "@/lib/scales/queries/scales";
import { lotsPageSchema } from "@/lib/stock/contract/lots";
import { findLotByLabel } from "@/lib/stock/queries/lot-label";
import { listLots } from "@/lib/stock/queries/lots";
import { listColours } from "@/lib/stock/queries/palette";

export const metadata: Metadata = { title: "Lots" };

export default async function LotsPage({ searchParams }: PageProps<"/stock/lots">) {
  const ctx = await pageContext("stock.read");
  const wanted = lotsPageSchema.parse(await searchParams);
  const { colour, container, state, q, after, ...filter } = wanted;
  const code = q === undefined ? null : readScan(q);
  const scanned = code && findLotByLabel(ctx.db.reader, code);
  if (scanned) redirect(`/stock/lots/${scanned.number}`);
  const number = q !== undefined && /^\d{1,9}$/.test(q) && Number(q) > 0 ? Number(q) : undefined;
  const { lots, next } = listLots(ctx, {
    ...filter,
    state: state ?? "held",
    colourCode: colour,
    containerId: container,
    number,
    place: number === undefined ? q : undefined,
    after,
  });
  const colours = listColours(ctx).items;
  const words = [
    colours.find((one) => one.code === colour)?.name,
    wanted.polymer && POLYMER_NAMES[wanted.polymer].name,
  ].filter(Boolean);
  const containers = listContainers(ctx).items.filter(({ kind }) => kind === "container");
  const { set, ...query } = queryOf(wanted);
  return (
    <>
      <PageHeader
        title={words.length > 0 ? `Lots: ${words.join(" ")}` : "Lots"}
        lead="The content of one container each, oldest first."
        back={{ href: "/stock", label: "Back to stock" }}
      />
      <LotsFilter wanted={query.values} colours={colours} containers={containers} set={set} />
      <LotList lots={lots} timeZone={requireScheme(ctx.db.reader).timeZone} />
      <LotsFoot values={query.values} next={next} numbers={lots.map((lot) => lot.number)} />
    </>
  );
}
