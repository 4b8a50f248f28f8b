import type { Metadata } from "next";
import { LabelSheets } from "@/components/bags/label-sheets";
import { SymbolNotices } from "@/components/bags/symbol-notices";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";
import { labelLines, typedSettings } from "@/lib/bags/rules/tag-sheet";
import { tagAddress } from "@/lib/core/bag-code";
import { KIND_NAMES } from "@/lib/core/plastics";
import { dayOf, formatDay } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { settings } from "@/lib/platform/env";
import { requireScheme } from "@/lib/platform/scheme";
import { listLotLabels } from "@/lib/stock/queries/lot-labels";
import { pileName } from "@/lib/stock/rules/material-words";

export const metadata: Metadata = { title: "Print lot labels" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function LotLabelsPage({ searchParams }: Props) {
  const ctx = await pageContext("stock.read");
  const query = await searchParams;
  const numbers = (typeof query.lots === "string" ? query.lots : "").split(".").map(Number);
  const { publicUrl } = settings();
  const { timeZone } = requireScheme(ctx.db.reader);
  const labels = listLotLabels(ctx, numbers).map((lot) => {
    const what = `${pileName(lot.colourName, lot.polymer)} ${KIND_NAMES[lot.kind].toLowerCase()}`;
    const [line] = labelLines(what, 1);
    const opened = formatDay(dayOf(lot.openedAt, timeZone));
    const words = [`Lot ${lot.number}`, line ?? "", opened] as const;
    return { code: lot.code, symbol: qrSymbol(tagAddress(publicUrl, lot.code)), words };
  });
  const [first] = labels;
  return (
    <>
      <PageHeader
        title="Print lot labels"
        lead="One for each container; scanning it opens the lot."
        back={{ href: "/stock/lots", label: "Lots" }}
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
            initial={typedSettings(query)}
            noun="label"
          />
        </>
      ) : (
        <EmptyState title="No lot to label">Open a lot and print its label from there.</EmptyState>
      )}
    </>
  );
}
