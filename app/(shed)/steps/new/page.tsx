import type { Metadata } from "next";
import { NewStep } from "@/components/steps/new-step";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { lotNumberSchema } from "@/lib/stock/contract/weighed";
import { listLots } from "@/lib/stock/queries/lots";

export const metadata: Metadata = { title: "New step" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function NewStepPage({ searchParams }: Props) {
  const ctx = await pageContext("steps.record");
  const from = lotNumberSchema.safeParse((await searchParams).from);
  const lot = from.success
    ? (listLots(ctx, { state: "all", number: from.data }).lots[0] ?? null)
    : null;
  return (
    <>
      <PageHeader title="New step" back={{ href: "/steps", label: "Steps" }} />
      <NewStep
        helperId={requirePerson(ctx)}
        from={lot}
        timeZone={requireScheme(ctx.db.reader).timeZone}
      />
    </>
  );
}
