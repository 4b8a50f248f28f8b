import type { Metadata } from "next";
import { CheckWeightsSection } from "@/components/scales/check-weights-section";
import { ContainersSection } from "@/components/scales/containers-section";
import { ScalesSection } from "@/components/scales/scales-section";
import { ScalesToday } from "@/components/scales/scales-today";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { listManagedCheckWeights } from "@/lib/scales/queries/check-weights";
import { listScalesToday } from "@/lib/scales/queries/checks";
import { listManagedContainers, listManagedScales } from "@/lib/scales/queries/scales";
import { listTares } from "@/lib/scales/queries/tares";

export const metadata: Metadata = { title: "Scales" };

export default async function ScalesPage() {
  const ctx = await pageContext("scales.read");
  const manages = may(ctx, "scales.manage");
  const scales = manages ? listManagedScales(ctx) : [];
  return (
    <>
      <PageHeader
        title="Scales"
        titleInBar
        lead="Each day begins with a check weight on each scale."
      />
      {manages && scales.length === 0 ? null : <ScalesToday scales={listScalesToday(ctx).items} />}
      {manages ? (
        <>
          <ScalesSection scales={scales} />
          <CheckWeightsSection weights={listManagedCheckWeights(ctx)} />
          <ContainersSection
            containers={listManagedContainers(ctx)}
            tares={listTares(ctx)}
            scales={scales}
            timeZone={requireScheme(ctx.db.reader).timeZone}
          />
        </>
      ) : null}
    </>
  );
}
