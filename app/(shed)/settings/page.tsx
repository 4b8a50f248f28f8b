import type { Metadata } from "next";
import { LimitsForm } from "@/components/settings/limits-form";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { getStorageStanding } from "@/lib/stock/queries/limits";

export const metadata: Metadata = { title: "Settings" };

export default async function SettingsPage() {
  const ctx = await pageContext("settings.manage");
  return (
    <>
      <PageHeader
        title="Settings"
        lead="What holds for the whole shed. Leave a field empty for no limit."
      />
      <LimitsForm standing={getStorageStanding(ctx)} />
    </>
  );
}
