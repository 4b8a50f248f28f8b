import Link from "next/link";
import { DataTable, type Column } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import type { TagOrder } from "@/lib/bags/queries";
import { dayOf, formatDay } from "@/lib/core/time";

type TagOrdersProps = {
  orders: readonly TagOrder[];
  zone: string;
  /** Last order of this page, where older ones follow; null on the last page. */
  olderAfter: TagOrder["id"] | null;
};

/** Orders of tags, newest first, each with its way back to the printer. */
export function TagOrders({ orders, zone, olderAfter }: TagOrdersProps) {
  const columns: readonly Column<TagOrder>[] = [
    {
      key: "point",
      header: "For",
      head: true,
      cell: (order) => order.pointName ?? "No point yet",
    },
    { key: "day", header: "Ordered", cell: (order) => formatDay(dayOf(order.orderedAt, zone)) },
    { key: "count", header: "Tags", align: "figure", cell: (order) => String(order.count) },
    {
      key: "unused",
      header: "Not used yet",
      align: "figure",
      cell: (order) => String(order.unused),
    },
    {
      key: "print",
      header: <span className="sr-only">Print</span>,
      cell: (order) => (
        <Link
          href={`/tags/${order.id}/print`}
          className="link inline-flex min-h-11 items-center font-bold"
          aria-label={`Print the ${order.count} tags for ${order.pointName ?? "no point yet"}`}
        >
          Print
        </Link>
      ),
    },
  ];
  return (
    <div>
      <DataTable
        caption="Orders of tags, newest first"
        columns={columns}
        rows={orders}
        rowKey={(order) => order.id}
        empty={
          <EmptyState title="No tags yet">
            Every bag carries one. Order a sheet for each drop-off point, and one without a point as
            spares for bags that come without.
          </EmptyState>
        }
      />
      {olderAfter === null ? null : (
        <p className="mt-3">
          <Link
            href={{ pathname: "/tags", query: { after: olderAfter } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Older orders
          </Link>
        </p>
      )}
    </div>
  );
}
