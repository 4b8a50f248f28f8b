import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { QueryProvider } from "@/components/forms/query-provider";
import { PageHeader } from "@/components/ui/page-header";
import { CorrectWeighIn } from "@/components/weighing/correct-weigh-in";
import { formatCode } from "@/lib/core/bag-code";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { getWeighInPage } from "@/lib/weighing/queries/stored";

export const metadata: Metadata = { title: "Correct a weigh-in" };

export default async function CorrectWeighInPage({ params }: PageProps<"/weigh-ins/[id]/correct">) {
  const ctx = await pageContext("weighing.review");
  const weighIn = getWeighInPage(ctx, (await params).id);
  if (!weighIn) notFound();
  // Only what counts can be corrected; its page says what does so instead.
  if (weighIn.state !== "posted") redirect(`/weigh-ins/${weighIn.id}`);
  return (
    <>
      <PageHeader
        title={`Correct ${formatCode(weighIn.code)}`}
        lead="Say what should have been saved. Both stay in the history."
        back={{ href: `/weigh-ins/${weighIn.id}`, label: "Back to the weigh-in" }}
      />
      <QueryProvider>
        <CorrectWeighIn weighIn={weighIn} timeZone={requireScheme(ctx.db.reader).timeZone} />
      </QueryProvider>
    </>
  );
}
