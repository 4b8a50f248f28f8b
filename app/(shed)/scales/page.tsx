import type { Metadata } from "next";
import { ContainersSection } from "@/components/scales/containers-section";
import { ScalesSection } from "@/components/scales/scales-section";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { listManagedContainers, listManagedScales } from "@/lib/scales/queries/scales";

export const metadata: Metadata = { title: "Scales" };

export default async function ScalesPage() {
  const ctx = await pageContext("scales.manage");
  return (
    <>
      <PageHeader
        title="Scales"
        titleInBar
        lead="What the shed weighs with, and what is taken off for crates and sacks. A change counts for readings from now on."
      />
      <ScalesSection scales={listManagedScales(ctx)} />
      <ContainersSection containers={listManagedContainers(ctx)} />
    </>
  );
}
