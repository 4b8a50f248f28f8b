import type { Metadata } from "next";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { publicContext } from "@/lib/http/page-context";
import { listOpenPoints } from "@/lib/points/queries";
import { POINT_KIND_NAMES } from "@/lib/points/terms";

export const metadata: Metadata = { title: "Drop-off points" };

export default async function PointsPage() {
  const points = listOpenPoints(await publicContext());
  return (
    <div className="mx-auto w-full max-w-3xl">
      <PageHeader
        title="Drop-off points"
        lead="Bring clean, dry lids, tubs and bottles to any of these. Please empty and rinse them first."
      />
      {points.length === 0 ? (
        <EmptyState title="No drop-off point is open yet">
          The first ones will be listed here as soon as the scheme has opened them.
        </EmptyState>
      ) : (
        <ul className="rounded-ticket border border-rule bg-card">
          {points.map((point) => (
            <li
              key={point.id}
              className="flex flex-wrap items-baseline justify-between gap-x-6 px-5 py-3.5 not-first:border-t not-first:border-rule"
            >
              <span className="text-lg font-bold">{point.name}</span>
              <span className="text-soft">{POINT_KIND_NAMES[point.kind]}</span>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
