import type { Metadata } from "next";
import { Planner } from "@/components/production/planner";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { findRunPage } from "@/lib/http/run-page";
import { getCatalogue } from "@/lib/production/queries/catalogue";

export const metadata: Metadata = { title: "Change a plan" };

export default async function ChangePlanPage({ params }: PageProps<"/runs/[number]/plan">) {
  const ctx = await pageContext("production.plan");
  const { run, plan } = findRunPage(ctx, (await params).number);
  return (
    <>
      <PageHeader
        title={`Change the plan of run ${run.number}`}
        lead="What is reserved has to be given back first; then the plan can be changed."
        back={{ href: `/runs/${run.number}`, label: `Run ${run.number}` }}
      />
      <Planner
        catalogue={getCatalogue(ctx)}
        run={{ id: run.id, number: run.number, plan }}
        seed={plan.seed}
      />
    </>
  );
}
