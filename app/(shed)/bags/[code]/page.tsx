import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { ShedBag } from "@/components/bags/shed-bag";
import { getBagByCode, listCodesOfBag } from "@/lib/bags/queries";
import { formatCode, readCode } from "@/lib/core/bag-code";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getBagToSort } from "@/lib/sorting/queries/bag-to-sort";
import { listWeighInsOfBag } from "@/lib/weighing/queries/weigh-ins";

type Props = { params: Promise<{ code: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const reading = readCode((await params).code);
  return { title: reading.ok ? `Bag ${formatCode(reading.code)}` : "Bag" };
}

export default async function BagPage({ params }: Props) {
  const ctx = await pageContext("bags.read");
  const reading = readCode((await params).code);
  const bag = reading.ok ? getBagByCode(ctx.db.reader, reading.code) : null;
  if (!bag) notFound();
  return (
    <ShedBag
      bag={bag}
      codes={listCodesOfBag(ctx.db.reader, bag)}
      mayTag={may(ctx, "bags.tag")}
      weighIns={listWeighInsOfBag(ctx, bag.id)}
      sorted={getBagToSort(ctx, { code: bag.code }).sorted}
      timeZone={requireScheme(ctx.db.reader).timeZone}
      helperId={requirePerson(ctx)}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
