import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { SessionRecord } from "@/components/sorting/session-record";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getSortingPage } from "@/lib/sorting/queries/session-page";

export const metadata: Metadata = { title: "Sorting" };

export default async function SortingSessionPage({ params }: PageProps<"/sorting/sessions/[id]">) {
  const ctx = await pageContext("sorting.record");
  const session = getSortingPage(ctx, (await params).id);
  if (!session) notFound();
  return (
    <SessionRecord
      session={session}
      timeZone={requireScheme(ctx.db.reader).timeZone}
      helperId={requirePerson(ctx)}
      mayCorrect={may(ctx, "sorting.correct")}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
