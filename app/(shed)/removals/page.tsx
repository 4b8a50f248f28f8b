import type { Metadata } from "next";
import { LocalRules } from "@/components/removals/local-rules";
import { RejectBinTicket } from "@/components/removals/reject-bin-ticket";
import { RemovalList } from "@/components/removals/removal-list";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { formatKg } from "@/lib/core/mass";
import { dayOf } from "@/lib/core/time";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { getRejectBin } from "@/lib/removals/queries/reject-bin";
import { listRemovals } from "@/lib/removals/queries/removals";

export const metadata: Metadata = { title: "Taken away" };

export default async function RemovalsPage({ searchParams }: PageProps<"/removals">) {
  const ctx = await pageContext("removals.read");
  const { after } = await searchParams;
  const { timeZone } = requireScheme(ctx.db.reader);
  const page = listRemovals(ctx, typeof after === "string" ? after : undefined);
  const { count, grams } = page.unproven;
  return (
    <>
      <PageHeader
        title="Taken away"
        titleInBar
        lead="What left the shed without becoming a piece."
        actions={
          may(ctx, "removals.manage") ? (
            <ButtonLink href="/removals/destinations" variant="quiet" size="small">
              Destinations
            </ButtonLink>
          ) : undefined
        }
      />
      <div className="grid items-start gap-x-8 gap-y-6 rail:grid-cols-[22rem_minmax(0,1fr)]">
        <div className="grid gap-4">
          <RejectBinTicket
            bin={getRejectBin(ctx)}
            today={dayOf(ctx.now, timeZone)}
            timeZone={timeZone}
            mayRecord={may(ctx, "removals.record")}
          />
          {count > 0 ? (
            <Notice tone="warn" title={`${count} without a receipt`}>
              {formatKg(grams)} kg passed on, unproven.
            </Notice>
          ) : null}
          <LocalRules />
        </div>
        <div className="min-w-0">
          <RemovalList page={page} timeZone={timeZone} />
        </div>
      </div>
    </>
  );
}
