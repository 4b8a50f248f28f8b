import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { TONE_TEXT } from "@/components/ui/figure";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay } from "@/lib/core/time";
import type { RemovalsPage } from "@/lib/removals/queries/removals";
import { stateWords } from "./removal-words";

type Props = { page: RemovalsPage; timeZone: string };

/** What was taken away, newest first, each leading to its page. */
export function RemovalList({ page, timeZone }: Props) {
  return (
    <>
      <DataTable
        caption="Taken away"
        rows={page.removals}
        rowKey={({ id }) => id}
        empty={
          <EmptyState title="Nothing was taken away yet" as="h3">
            Rejects stay in the bin until somebody records where they went.
          </EmptyState>
        }
        columns={[
          {
            key: "day",
            header: "When",
            head: true,
            cell: ({ id, occurredAt, noteNumber }) => (
              <Link
                href={`/removals/${id}`}
                className="link inline-flex min-h-11 items-center font-bold"
              >
                {formatDay(dayOf(occurredAt, timeZone))}
                <span className="sr-only">{noteNumber ? `, note ${noteNumber}` : ""}</span>
              </Link>
            ),
          },
          {
            key: "receiver",
            header: "To",
            cell: ({ receiverName }) => <span className="wrap-anywhere">{receiverName}</span>,
          },
          {
            key: "source",
            header: "From",
            cell: ({ source }) => (source === "reject-bin" ? "Reject bin" : "Stock"),
          },
          {
            key: "state",
            header: "State",
            cell: (removal) => {
              const { words, tone } = stateWords(removal);
              return <span className={`font-bold ${TONE_TEXT[tone]}`}>{words}</span>;
            },
          },
          { key: "kg", header: "kg", align: "figure", cell: ({ grams }) => formatKg(grams) },
        ]}
      />
      {page.next === null ? null : (
        <p className="mt-4">
          <Link
            href={{ pathname: "/removals", query: { after: page.next } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Earlier ones
          </Link>
        </p>
      )}
    </>
  );
}
