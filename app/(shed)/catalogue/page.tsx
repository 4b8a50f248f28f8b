import type { Metadata } from "next";
import { CatalogueDensities } from "@/components/production/catalogue-densities";
import { CatalogueMachines } from "@/components/production/catalogue-machines";
import { CataloguePieces } from "@/components/production/catalogue-pieces";
import { CatalogueRetired } from "@/components/production/catalogue-retired";
import { CatalogueTools } from "@/components/production/catalogue-tools";
import { PageHeader } from "@/components/ui/page-header";
import { dayOf, instant } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getCatalogue } from "@/lib/production/queries/catalogue";

export const metadata: Metadata = { title: "Catalogue" };

export default async function CataloguePage() {
  const ctx = await pageContext("production.read");
  const mayEdit = may(ctx, "production.catalogue");
  const { pieces, tools, machines, densities } = getCatalogue(ctx);
  const { timeZone } = requireScheme(ctx.db.reader);
  const inUse = <T extends { retiredAt: number | null }>(all: readonly T[]): T[] =>
    all.filter(({ retiredAt }) => retiredAt === null);
  const retired = [...pieces, ...tools, ...machines].flatMap(({ id, name, retiredAt }) =>
    retiredAt === null ? [] : [{ id, name, day: dayOf(instant(retiredAt), timeZone) }],
  );
  return (
    <>
      <PageHeader
        title="Catalogue"
        titleInBar
        lead="What the workshop makes, with which tools and machines. A change counts for plans from now on."
      />
      <CataloguePieces pieces={inUse(pieces)} densities={densities} mayEdit={mayEdit} />
      <CatalogueTools tools={inUse(tools)} pieces={pieces} mayEdit={mayEdit} />
      <CatalogueMachines machines={inUse(machines)} mayEdit={mayEdit} />
      <CatalogueDensities densities={densities} mayEdit={mayEdit} />
      <CatalogueRetired retired={retired} />
    </>
  );
}
