import type { Metadata } from "next";
import { Planner } from "@/components/production/planner";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { getCatalogue } from "@/lib/production/queries/catalogue";

export const metadata: Metadata = { title: "Plan a run" };

export default async function NewRunPage() {
  const ctx = await pageContext("production.plan");
  return (
    <>
      <PageHeader
        title="Plan a run"
        lead="What to make, how many, in which colours; at once it says whether there is enough."
        back={{ href: "/runs", label: "Runs" }}
      />
      <Planner catalogue={getCatalogue(ctx)} run={null} seed={ctx.now % 4_294_967_296} />
    </>
  );
}
