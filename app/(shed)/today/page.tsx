import type { Metadata } from "next";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { TodayScreen } from "@/components/weighing/today-screen";
import { pageContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Today" };

export default async function TodayPage() {
  await pageContext("weighing.record");
  return (
    <>
      <PageHeader
        title="Today"
        titleInBar
        lead="What was weighed in today."
        actions={<ButtonLink href="/weigh-in">Weigh a bag in</ButtonLink>}
      />
      <TodayScreen />
    </>
  );
}
