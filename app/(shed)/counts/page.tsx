import type { Metadata } from "next";
import Link from "next/link";
import { CountsReview } from "@/components/stock/counts-review";
import { Figure } from "@/components/ui/figure";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { requireScheme } from "@/lib/platform/scheme";
import { dayOf } from "@/lib/core/time";
import { countsToReviewEndpoint } from "@/lib/stock/contract/counts";
import { listCountsToReview } from "@/lib/stock/queries/counts";

export const metadata: Metadata = { title: "Counts" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function CountsPage({ searchParams }: Props) {
  const ctx = await pageContext("stock.review");
  const wanted = countsToReviewEndpoint.input.catch({}).parse(await searchParams);
  const { counts, next, waiting } = listCountsToReview(ctx, wanted);
  const { timeZone, firstDay } = requireScheme(ctx.db.reader);
  const opening = may(ctx, "stock.opening") && dayOf(ctx.now, timeZone) <= firstDay;
  return (
    <>
      <PageHeader
        title="Counts"
        titleInBar
        lead="What was counted on the spot, oldest first. Let it stand, or put it right."
        figures={<Figure label="To look at" value={String(waiting)} align="right" />}
        actions={
          opening ? (
            <Link
              href="/counts/opening"
              className="link inline-flex min-h-11 items-center font-bold"
            >
              Enter opening stock
            </Link>
          ) : null
        }
      />
      <CountsReview counts={counts} timeZone={timeZone} />
      {next === null ? null : (
        <p className="mt-4">
          <Link
            href={{ pathname: "/counts", query: { after: next } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Later counts
          </Link>
        </p>
      )}
    </>
  );
}
