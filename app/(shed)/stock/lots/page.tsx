import type { Metadata } from "next";
import Link from "next/link";
import { filterValues } from "@/components/stock/filter-query";
import { LotList } from "@/components/stock/lot-list";
import { PageHeader } from "@/components/ui/page-header";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { lotsPageSchema } from "@/lib/stock/contract/lots";
import { listLots } from "@/lib/stock/queries/lots";

export const metadata: Metadata = { title: "Lots" };

export default async function LotsPage({ searchParams }: PageProps<"/stock/lots">) {
  const ctx = await pageContext("stock.read");
  const wanted = lotsPageSchema.parse(await searchParams);
  const { colour, after, ...filter } = wanted;
  const { lots, next } = listLots(ctx, { state: "held", ...filter, colourCode: colour, after });
  const colourName = colour === undefined ? null : (lots[0]?.colourName ?? colour);
  const words = [colourName, wanted.polymer && POLYMER_NAMES[wanted.polymer].name].filter(Boolean);
  return (
    <>
      <PageHeader
        title={words.length > 0 ? `Lots: ${words.join(" ")}` : "Lots"}
        lead="What holds it, oldest first."
        back={{ href: "/stock", label: "Back to stock" }}
      />
      <LotList lots={lots} timeZone={requireScheme(ctx.db.reader).timeZone} />
      {next === null ? null : (
        <p className="mt-4">
          <Link
            href={{
              pathname: "/stock/lots",
              query: { ...filterValues(wanted), after: String(next) },
            }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Later lots
          </Link>
        </p>
      )}
    </>
  );
}
