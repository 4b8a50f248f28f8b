import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { LabelSheets } from "@/components/bags/label-sheets";
import { SymbolNotices } from "@/components/bags/symbol-notices";
import { PageHeader } from "@/components/ui/page-header";
import { getTagOrderSheet } from "@/lib/bags/queries";
import { qrSize, qrSymbol } from "@/lib/bags/rules/qr";
import { typedSettings } from "@/lib/bags/rules/tag-sheet";
import { tagAddress } from "@/lib/core/bag-code";
import { pageContext } from "@/lib/http/page-context";
import { settings } from "@/lib/platform/env";

export const metadata: Metadata = { title: "Print tags" };

const WORDS = ["Clean and dry.", "Scan to see what", "becomes of it."] as const;

type Props = { params: Promise<{ order: string }>; searchParams: Promise<Record<string, unknown>> };

export default async function PrintTagsPage({ params, searchParams }: Props) {
  const ctx = await pageContext("tags.order");
  const found = getTagOrderSheet(ctx, (await params).order);
  if (!found) notFound();
  const { publicUrl } = settings();
  const made = found.codes.map((code) => ({ code, symbol: qrSymbol(tagAddress(publicUrl, code)) }));
  const [first] = made;
  if (!first) notFound();
  const qr = qrSize(first.symbol.modules);
  const { pointName } = found.order;
  return (
    <>
      <PageHeader
        title="Print tags"
        lead={pointName === null ? "For no point yet." : `For ${pointName}.`}
        back={{ href: "/tags", label: "Tags" }}
      />
      <SymbolNotices symbol={first.symbol} qr={qr} publicUrl={publicUrl} />
      <LabelSheets
        labels={made.map(({ code, symbol }) => ({ code, path: symbol.path, words: WORDS }))}
        qr={qr}
        initial={typedSettings(await searchParams)}
        noun="tag"
      />
    </>
  );
}
