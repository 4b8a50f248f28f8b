import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { LotBag } from "@/lib/stock/queries/lots";

type Props = { bags: readonly LotBag[]; more: boolean; timeZone: string };

/** The bags that went into a lot, newest first. */
export function LotBags({ bags, more, timeZone }: Props) {
  if (bags.length === 0) return null;
  return (
    <section className="mt-8" aria-label="Bags that went in">
      <h2 className="mb-2 text-lg">Bags that went in</h2>
      {more ? (
        <p className="mb-2 text-sm text-soft">
          The last {bags.length}; every one stands among the movements below.
        </p>
      ) : null}
      <DataTable
        caption="Bags that went in"
        rows={bags}
        rowKey={(bag) => bag.code}
        columns={[
          {
            key: "code",
            header: "Tag",
            head: true,
            cell: (bag) => (
              <Link
                href={`/bags/${bag.code}`}
                className="link inline-flex min-h-11 items-center font-mono"
              >
                {formatCode(bag.code)}
              </Link>
            ),
          },
          { key: "point", header: "Drop-off point", cell: (bag) => bag.pointName ?? "Not known" },
          {
            key: "sorted",
            header: "Went in",
            cell: (bag) => formatDay(dayOf(instant(bag.sortedAt), timeZone)),
          },
          { key: "kg", header: "kg", align: "figure", cell: (bag) => formatKg(bag.grams) },
        ]}
      />
    </section>
  );
}
