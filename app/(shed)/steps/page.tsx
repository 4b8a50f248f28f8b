import type { Metadata } from "next";
import Link from "next/link";
import { OwnLosses } from "@/components/steps/own-losses";
import { StepList } from "@/components/steps/step-list";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { listStepsEndpoint } from "@/lib/stock/contract/steps";
import { listOwnLosses } from "@/lib/stock/queries/own-loss";
import { listSteps } from "@/lib/stock/queries/steps";

export const metadata: Metadata = { title: "Steps" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function StepsPage({ searchParams }: Props) {
  const ctx = await pageContext("stock.read");
  const wanted = listStepsEndpoint.input.catch({}).parse(await searchParams);
  const { steps, next } = listSteps(ctx, wanted);
  return (
    <>
      <PageHeader
        title="Steps"
        titleInBar
        lead="Washing, drying, shredding: from a lot to another form or wash state."
        actions={
          may(ctx, "steps.record") ? <ButtonLink href="/steps/new">New step</ButtonLink> : null
        }
      />
      <OwnLosses losses={listOwnLosses(ctx)} />
      <StepList steps={steps} timeZone={requireScheme(ctx.db.reader).timeZone} />
      {next === null ? null : (
        <p className="mt-4">
          <Link
            href={{
              pathname: "/steps",
              query: { ...(wanted.kind ? { kind: wanted.kind } : {}), before: next },
            }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Older steps
          </Link>
        </p>
      )}
    </>
  );
}
