import type { Metadata } from "next";
import { PageHeader } from "@/components/ui/page-header";
import { WeighInScreen } from "@/components/weighing/weigh-in-screen";
import { pageContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Weigh-in" };

/** Everything about people and bags comes from GET handlers: this page's HTML may be kept on a shared phone. */
export default async function WeighInPage() {
  await pageContext("weighing.record");
  return (
    <>
      <PageHeader title="Weigh-in" titleInBar />
      <WeighInScreen />
    </>
  );
}
