import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { day, dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import type { LotMovement } from "@/lib/stock/contract/lots";
import { MovementWords } from "./movement-words";

type Props = {
  number: number;
  page: { movements: readonly LotMovement[]; next: string | null };
  timeZone: string;
};

/** Everything that ever went into or out of a lot, newest first. */
export function LotMovements({ number, page, timeZone }: Props) {
  return (
    <section className="mt-8" aria-label="Every movement">
      <h2 className="mb-2 text-lg">Every movement</h2>
      <DataTable
        caption="Every movement, newest first"
        rows={page.movements}
        rowKey={(movement) => `${movement.entryId}.${movement.seq}`}
        empty={<p className="text-soft">Nothing has moved here yet.</p>}
        columns={[
          {
            key: "when",
            header: "When",
            head: true,
            cell: ({ occurredAt, bookedDay }) => {
              const trueDay = dayOf(instant(occurredAt), timeZone);
              return (
                <>
                  {formatDay(trueDay)}{" "}
                  <span className="font-normal text-soft">
                    {formatClock(instant(occurredAt), timeZone)}
                  </span>
                  {trueDay === bookedDay ? null : (
                    <span className="block text-sm font-normal text-soft">
                      booked {formatDay(day(bookedDay))}
                    </span>
                  )}
                </>
              );
            },
          },
          {
            key: "what",
            header: "What",
            cell: (movement) => <MovementWords movement={movement} />,
          },
          {
            key: "bag",
            header: "Bag",
            cell: ({ bagCode }) =>
              bagCode === null ? (
                "–"
              ) : (
                <Link
                  href={`/bags/${bagCode}`}
                  className="link inline-flex min-h-11 items-center font-mono"
                >
                  {formatCode(bagCode)}
                </Link>
              ),
          },
          { key: "who", header: "By", cell: ({ doneBy }) => doneBy ?? "–" },
          {
            key: "grams",
            header: "kg",
            align: "figure",
            cell: ({ grams }) => (grams > 0 ? `+${formatKg(grams)}` : formatKg(grams)),
          },
          {
            key: "after",
            header: "Held after",
            align: "figure",
            cell: ({ afterGrams }) => formatKg(afterGrams),
          },
        ]}
      />
      {page.next === null ? null : (
        <p className="mt-3">
          <Link
            href={{ pathname: `/stock/lots/${number}`, query: { before: page.next } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Older movements
          </Link>
        </p>
      )}
    </section>
  );
}
