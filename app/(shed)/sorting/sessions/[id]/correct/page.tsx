import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { QueryProvider } from "@/components/forms/query-provider";
import { CorrectSession } from "@/components/sorting/correct-session";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { getSortingPage } from "@/lib/sorting/queries/session-page";

export const metadata: Metadata = { title: "Correct a sorting" };

export default async function CorrectSortingPage({
  params,
}: PageProps<"/sorting/sessions/[id]/correct">) {
  const ctx = await pageContext("sorting.correct");
  const session = getSortingPage(ctx, (await params).id);
  if (!session) notFound();
  // Only what stands can be corrected; its page says what does so instead.
  if (session.state !== "closed") redirect(`/sorting/sessions/${session.id}`);
  return (
    <>
      <PageHeader
        title="Correct a sorting"
        lead="Say what should have been saved. Both stay in the history."
        back={{ href: `/sorting/sessions/${session.id}`, label: "Back to the sorting" }}
      />
      <QueryProvider>
        <CorrectSession session={session} timeZone={requireScheme(ctx.db.reader).timeZone} />
      </QueryProvider>
    </>
  );
}
