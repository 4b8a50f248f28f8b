import type { Metadata } from "next";
import { RunRecord } from "@/components/production/run-record";
import { pageContext } from "@/lib/http/page-context";
import { findRunPage } from "@/lib/http/run-page";
import { may } from "@/lib/platform/context";

export const metadata: Metadata = { title: "Run" };

export default async function RunPage({ params }: PageProps<"/runs/[number]">) {
  const ctx = await pageContext("production.read");
  const page = findRunPage(ctx, (await params).number);
  return <RunRecord page={page} mayPlan={may(ctx, "production.plan")} />;
}
