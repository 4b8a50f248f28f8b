import Link from "next/link";
import { DataTable, type Column } from "@/components/ui/data-table";
import { formatKg } from "@/lib/core/mass";
import { KIND_NAMES, POLYMER_NAMES } from "@/lib/core/plastics";
import { formatMonth } from "@/lib/core/time";
import type { BalanceRow } from "@/lib/reports/queries/balance";
import type { Report } from "@/lib/reports/queries/report";
import type { Figures } from "@/lib/reports/rules/balance";
import { reportValues } from "@/lib/reports/rules/report-query";
import {
  GROUPING_NAMES,
  LOOSE_NAMES,
  ORIGIN_NAMES,
  ROWS_A_PAGE,
  type Grouping,
  type LooseRow,
} from "@/lib/reports/terms";

type Props = { report: Report; by: readonly Grouping[]; page: number };

const isLoose = (key: string): key is LooseRow => key in LOOSE_NAMES;

function wordsOf(row: BalanceRow, grouping: Grouping): string {
  switch (grouping) {
    case "month":
      return row.month === null ? "" : formatMonth(row.month);
    case "point":
      return row.pointName ?? (row.originType === null ? "" : ORIGIN_NAMES[row.originType]);
    case "polymer":
      if (row.polymer === null) return "";
      return isLoose(row.polymer) ? LOOSE_NAMES[row.polymer] : POLYMER_NAMES[row.polymer].name;
    case "kind":
      if (row.kind === null) return "";
      return isLoose(row.kind) ? LOOSE_NAMES[row.kind] : KIND_NAMES[row.kind];
    case "colour":
      if (row.colourCode === null) return "";
      return isLoose(row.colourCode)
        ? LOOSE_NAMES[row.colourCode]
        : (row.colourName ?? row.colourCode);
  }
}

type FigureColumn = { header: string; of: (figures: Figures) => number; balance?: boolean };

const FIGURES: readonly FigureColumn[] = [
  { header: "Before", of: (f) => f.opening, balance: true },
  { header: "Collected", of: (f) => f.collected },
  { header: "Other in", of: (f) => f.otherIn + f.openingCount },
  { header: "Re-sorted", of: (f) => f.resorted, balance: true },
  { header: "Taken away", of: (f) => f.disposed + f.passedProven + f.passedUnproven },
  { header: "Loss", of: (f) => f.loss },
  { header: "Difference", of: (f) => f.difference },
  { header: "Pieces", of: (f) => f.pieces },
  { header: "After", of: (f) => f.closing, balance: true },
  { header: "Accepted", of: (f) => f.accepted },
  { header: "Rejected", of: (f) => f.rejected },
];

/** The report broken down: one row each, every one balancing to the gram. */
export function BalanceTable({ report, by, page }: Props) {
  if (by.length === 0) return null;
  const pages = Math.max(1, Math.ceil(report.rowCount / ROWS_A_PAGE));
  const figures = FIGURES.filter(
    ({ of, balance }) =>
      (report.hasBalance || !balance) &&
      (balance || report.rows.some((row) => of(row.figures) !== 0)),
  );
  const columns: Column<BalanceRow>[] = [
    {
      key: "row",
      header: by.map((grouping) => GROUPING_NAMES[grouping]).join(", "),
      head: true,
      cell: (row) => by.map((grouping) => wordsOf(row, grouping)).join(", "),
    },
    ...figures.map(({ header, of }): Column<BalanceRow> => ({
      key: header,
      header,
      align: "figure",
      cell: (row) => formatKg(of(row.figures)),
    })),
    { key: "bags", header: "Bags", align: "figure", cell: (row) => String(row.figures.bags) },
  ];
  const link = (to: number, words: string) => (
    <Link
      href={{ pathname: "/reports", query: reportValues(report.period, by, to) }}
      className="link inline-flex min-h-11 items-center font-bold"
    >
      {words}
    </Link>
  );
  return (
    <section aria-label="Broken down" className="mt-8">
      <h2 className="mb-1 text-lg">
        By {by.map((grouping) => GROUPING_NAMES[grouping].toLowerCase()).join(", ")}
      </h2>
      <p className="mb-3 max-w-[70ch] text-sm text-soft">
        kg. Before + collected + other in + re-sorted − taken away − loss − difference − pieces =
        after, to the gram. Figures by drop-off point are attributed by weight.
      </p>
      <DataTable
        caption="Mass balance, broken down, in kg"
        scrolls
        rows={report.rows}
        rowKey={(row) => [row.month, row.originNo, row.polymer, row.kind, row.colourCode].join("|")}
        columns={columns}
        empty={
          <p className="text-soft">Nothing moved on these days, and nothing stood in the shed.</p>
        }
      />
      {pages > 1 ? (
        <nav aria-label="Pages of the table" className="mt-3 flex flex-wrap items-center gap-x-5">
          {page > 1 ? link(page - 1, "Rows before") : null}
          <span className="text-sm text-soft">
            Page {page} of {pages}, {report.rowCount} rows; the CSV has them all
          </span>
          {page < pages ? link(page + 1, "More rows") : null}
        </nav>
      ) : null}
    </section>
  );
}
