import { DataTable, type Column } from "@/components/ui/data-table";
import { formatKg } from "@/lib/core/mass";
import type { RunSummary } from "@/lib/production/contract/plans";
import type { Reservation } from "@/lib/production/queries/runs";

type Props = { run: RunSummary; reservations: readonly Reservation[] };
type Row = RunSummary["colours"][number] & { reserved: number };

/** Share, need and promise of each colour. */
export function BlendTable({ run, reservations }: Props) {
  const rows = run.colours.map((colour): Row => {
    const own = reservations.filter(({ colourCode }) => colourCode === colour.colourCode);
    const reserved = own.reduce((sum, { grams, shortGrams }) => sum + grams - shortGrams, 0);
    return { ...colour, reserved };
  });
  const columns: readonly Column<Row>[] = [
    { key: "colour", header: "Colour", cell: ({ name }) => name, head: true },
    {
      key: "share",
      header: "Share, %",
      cell: ({ thousandths }) => (thousandths / 10).toFixed(1),
      align: "figure",
    },
    { key: "needs", header: "Needs, kg", cell: ({ grams }) => formatKg(grams), align: "figure" },
    {
      key: "reserved",
      header: "Reserved, kg",
      cell: ({ reserved }) => formatKg(reserved),
      align: "figure",
    },
  ];
  return (
    <div className="mt-4">
      <DataTable
        caption="The blend by colour"
        columns={columns}
        rows={rows}
        rowKey={({ colourCode }) => colourCode}
      />
    </div>
  );
}
