import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { RemovalRecord } from "@/components/removals/removal-record";
import { dayOf } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getRemoval } from "@/lib/removals/queries/removal-page";

export const metadata: Metadata = { title: "Taken away" };

export default async function RemovalPage({ params }: PageProps<"/removals/[id]">) {
  const ctx = await pageContext("removals.read");
  const removal = getRemoval(ctx, (await params).id);
  if (!removal) notFound();
  const { timeZone } = requireScheme(ctx.db.reader);
  return (
    <RemovalRecord
      removal={removal}
      today={dayOf(ctx.now, timeZone)}
      timeZone={timeZone}
      mayRecord={may(ctx, "removals.record")}
      helperId={requirePerson(ctx)}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
