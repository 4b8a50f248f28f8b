import type { Metadata } from "next";
import { CatalogueDensities } from "@/components/production/catalogue-densities";
import { CatalogueMachines } from "@/components/production/catalogue-machines";
import { CataloguePieces } from "@/components/production/catalogue-pieces";
import { CatalogueTools } from "@/components/production/catalogue-tools";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { getCatalogue } from "@/lib/production/queries/catalogue";

export const metadata: Metadata = { title: "Catalogue" };

export default async function CataloguePage() {
  const ctx = await pageContext("production.read");
  const mayEdit = may(ctx, "production.catalogue");
  const { pieces, tools, machines, densities } = getCatalogue(ctx);
  /** Whoever may bring a retired entry back sees it, after the others. */
  const shown = <T extends { retiredAt: number | null }>(all: readonly T[]): T[] => [
    ...all.filter(({ retiredAt }) => retiredAt === null),
    ...(mayEdit ? all.filter(({ retiredAt }) => retiredAt !== null) : []),
  ];
  return (
    <>
      <PageHeader
        title="Catalogue"
        titleInBar
        lead="What the workshop makes, with which tools and machines. A change counts for plans from now on."
      />
      <CataloguePieces pieces={shown(pieces)} densities={densities} mayEdit={mayEdit} />
      <CatalogueTools tools={shown(tools)} pieces={pieces} mayEdit={mayEdit} />
      <CatalogueMachines machines={shown(machines)} mayEdit={mayEdit} />
      <CatalogueDensities densities={densities} mayEdit={mayEdit} />
    </>
  );
}
