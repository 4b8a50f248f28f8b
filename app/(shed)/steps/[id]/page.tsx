import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { StepPage } from "@/components/steps/step-page";
import { pageContext } from "@/lib/http/page-context";
import { may, requirePerson } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { undoStepEndpoint } from "@/lib/stock/contract/steps";
import { getStep } from "@/lib/stock/queries/steps";

export const metadata: Metadata = { title: "Step" };

type Props = { params: Promise<{ id: string }> };

export default async function StepRoute({ params }: Props) {
  const ctx = await pageContext("stock.read");
  const id = undoStepEndpoint.input.shape.id.safeParse((await params).id);
  const step = id.success ? getStep(ctx, id.data) : null;
  if (!step) notFound();
  return (
    <StepPage
      step={step}
      timeZone={requireScheme(ctx.db.reader).timeZone}
      mayCorrect={may(ctx, "steps.record")}
      helperId={requirePerson(ctx)}
      mayRemovePhotos={may(ctx, "photos.remove")}
    />
  );
}
