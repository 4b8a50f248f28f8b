import type { Metadata } from "next";
import { WaitingList } from "@/components/today/waiting-list";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { TodayScreen } from "@/components/weighing/today-screen";
import { pageContext } from "@/lib/http/page-context";
import { getDesk } from "@/lib/reports/queries/today";
import { doneLines, waitingLines } from "@/lib/reports/rules/desk-words";

export const metadata: Metadata = { title: "Today" };

export default async function TodayPage() {
  const { waiting, done } = getDesk(await pageContext("weighing.record"));
  return (
    <>
      <PageHeader
        title="Today"
        titleInBar
        actions={<ButtonLink href="/weigh-in">Weigh a bag in</ButtonLink>}
      />
      <WaitingList lines={waitingLines(waiting)} done={doneLines(done)} />
      <TodayScreen />
    </>
  );
}
