import type { Metadata } from "next";
import Link from "next/link";
import { RunList } from "@/components/production/run-list";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { listRunsEndpoint } from "@/lib/production/contract/plans";
import { listRuns } from "@/lib/production/queries/runs";

export const metadata: Metadata = { title: "Runs" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function RunsPage({ searchParams }: Props) {
  const ctx = await pageContext("production.read");
  const wanted = listRunsEndpoint.input.catch({}).parse(await searchParams);
  const { runs, next } = listRuns(ctx, wanted);
  const mayPlan = may(ctx, "production.plan");
  return (
    <>
      <PageHeader
        title="Runs"
        titleInBar
        lead="What the workshop plans to make, and the stock that is promised to it."
        actions={
          <>
            <ButtonLink href="/catalogue" variant="quiet">
              Catalogue
            </ButtonLink>
            {mayPlan ? <ButtonLink href="/runs/new">Plan a run</ButtonLink> : null}
          </>
        }
      />
      <RunList runs={runs} mayPlan={mayPlan} />
      {next === null ? null : (
        <p className="mt-4">
          <Link
            href={{ pathname: "/runs", query: { after: next } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Older runs
          </Link>
        </p>
      )}
    </>
  );
}
