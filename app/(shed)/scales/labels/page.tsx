import type { Metadata } from "next";
import { LabelSheets } from "@/components/bags/label-sheets";
import { SymbolNotices } from "@/components/bags/symbol-notices";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";
import { labelLines, typedSettings } from "@/lib/bags/rules/tag-sheet";
import { tagAddress, type LabelCode } from "@/lib/core/bag-code";
import { formatMilligrams } from "@/lib/core/mass";
import { pageContext } from "@/lib/http/page-context";
import { settings } from "@/lib/platform/env";
import { listManagedContainers } from "@/lib/scales/queries/scales";

export const metadata: Metadata = { title: "Print container labels" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function ContainerLabelsPage({ searchParams }: Props) {
  const ctx = await pageContext("scales.manage");
  const { publicUrl } = settings();
  const labels = listManagedContainers(ctx).flatMap((one) => {
    if (one.labelCode === null || one.retiredAt !== null) return [];
    const symbol = qrSymbol(tagAddress(publicUrl, one.labelCode as LabelCode));
    const [line, next] = labelLines(one.name, 2);
    const words = [line ?? "", next ?? "", `${formatMilligrams(one.tareMilligrams)} kg`] as const;
    return [{ code: one.labelCode, symbol, words }];
  });
  const [first] = labels;
  return (
    <>
      <PageHeader
        title="Print container labels"
        lead="Scanning one at the scale takes off the container's empty weight."
        back={{ href: "/scales", label: "Scales" }}
      />
      {first ? (
        <>
          <SymbolNotices
            symbol={first.symbol}
            qr={qrSize(first.symbol.modules)}
            publicUrl={publicUrl}
          />
          <LabelSheets
            labels={labels.map(({ code, symbol, words }) => ({ code, path: symbol.path, words }))}
            qr={qrSize(first.symbol.modules)}
            initial={typedSettings(await searchParams)}
            noun="label"
          />
        </>
      ) : (
        <EmptyState title="No container to label">Add one on the page of scales first.</EmptyState>
      )}
    </>
  );
}
