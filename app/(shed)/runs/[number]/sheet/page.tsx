import type { Metadata } from "next";
import { RunSheet } from "@/components/production/run-sheet";
import { qrSymbol } from "@/lib/bags/rules/qr";
import { tagAddress } from "@/lib/core/bag-code";
import { pageContext } from "@/lib/http/page-context";
import { findRunPage } from "@/lib/http/run-page";
import { settings } from "@/lib/platform/env";

export const metadata: Metadata = { title: "Run sheet" };

export default async function RunSheetPage({ params }: PageProps<"/runs/[number]/sheet">) {
  const ctx = await pageContext("production.read");
  const page = findRunPage(ctx, (await params).number);
  const symbol = qrSymbol(tagAddress(settings().publicUrl, page.labelCode));
  return <RunSheet page={page} symbol={symbol} />;
}
