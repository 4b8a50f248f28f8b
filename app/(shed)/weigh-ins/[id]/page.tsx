import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { WeighInRecord } from "@/components/weighing/weigh-in-record";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getWeighInPage } from "@/lib/weighing/queries/stored";

export const metadata: Metadata = { title: "Weigh-in" };

export default async function WeighInRecordPage({ params }: PageProps<"/weigh-ins/[id]">) {
  const ctx = await pageContext("weighing.record");
  const weighIn = getWeighInPage(ctx, (await params).id);
  if (!weighIn) notFound();
  return (
    <WeighInRecord
      weighIn={weighIn}
      timeZone={requireScheme(ctx.db.reader).timeZone}
      helperId={requirePerson(ctx)}
      mayCorrect={may(ctx, "weighing.review")}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
