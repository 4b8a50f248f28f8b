import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { CorrectStep } from "@/components/steps/correct-step";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { undoStepEndpoint } from "@/lib/stock/contract/steps";
import { getStep } from "@/lib/stock/queries/steps";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";

export const metadata: Metadata = { title: "Correct a step" };

type Props = { params: Promise<{ id: string }> };

export default async function CorrectStepPage({ params }: Props) {
  const ctx = await pageContext("steps.record");
  const id = undoStepEndpoint.input.shape.id.safeParse((await params).id);
  const step = id.success ? getStep(ctx, id.data) : null;
  if (!step) notFound();
  return (
    <>
      <PageHeader
        title={`Correct: ${STEP_KIND_NAMES[step.kind].toLowerCase()}`}
        lead="Say what should have stood there. It always goes through; what was taken since is named."
        back={{ href: `/steps/${step.stepId}`, label: "Back to the step" }}
      />
      <CorrectStep
        step={step}
        helperId={requirePerson(ctx)}
        timeZone={requireScheme(ctx.db.reader).timeZone}
      />
    </>
  );
}
