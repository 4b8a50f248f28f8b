import type { ReactNode } from "react";
import { decimalPadding } from "./decimal-align";

export type Column<Row> = {
  key: string;
  header: ReactNode;
  /** A string for a figure is aligned on its decimal point. */
  cell: (row: Row) => ReactNode;
  align?: "text" | "figure";
  /** The row's name: heads its ticket on a phone and is the row header. One column at most. */
  head?: boolean;
  footer?: ReactNode;
  /** Left out of the ticket on a phone. */
  wideOnly?: boolean;
};

type DataTableProps<Row> = {
  /** Names the table aloud; shown when `showCaption`. */
  caption: ReactNode;
  showCaption?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string | number;
  /** Instead of rows: an EmptyState or a sentence. */
  empty?: ReactNode;
  /** Many columns: the table scrolls sideways in its own frame, its header and row names stay. */
  scrolls?: boolean;
};

const text = (value: ReactNode): string | null => (typeof value === "string" ? value : null);

/**
 * A table from 700 px, a ticket a row below. Roles are written out because `display: block` takes a
 * table's meaning away in some browsers.
 */
export function DataTable<Row>({
  caption,
  showCaption = false,
  columns,
  rows,
  rowKey,
  empty,
  scrolls = false,
}: DataTableProps<Row>) {
  if (rows.length === 0 && empty) return <>{empty}</>;
  const cells = rows.map((row) => columns.map((column) => column.cell(row)));
  const padding = columns.map((column, at) =>
    column.align === "figure"
      ? decimalPadding([
          ...cells.map((line) => text(line[at])),
          column.footer === undefined ? null : text(column.footer),
        ])
      : [],
  );
  const hasFooter = columns.some((column) => column.footer !== undefined);
  const narrow = (column: Column<Row>) => (column.wideOnly ? "max-wide:hidden" : "");
  const aligned = (column: Column<Row>) =>
    column.align === "figure" ? "text-right font-mono whitespace-nowrap" : "max-wide:text-right";

  const content = (column: Column<Row>, value: ReactNode, pad: string | undefined) => (
    <>
      {column.head ? null : (
        <span
          aria-hidden
          className="shrink-0 text-left font-body text-sm tracking-normal text-soft wide:hidden"
        >
          {column.header}
        </span>
      )}
      <span className="min-w-0">
        {value}
        {pad ? (
          <span aria-hidden className="invisible max-wide:hidden">
            {pad}
          </span>
        ) : null}
      </span>
    </>
  );

  const table = (
    <table role="table" className="w-full border-collapse text-left max-wide:block">
      <caption
        className={
          showCaption
            ? "pb-2 text-left text-sm font-bold text-soft max-wide:block wide:px-5 wide:pt-3 wide:pb-0"
            : "sr-only"
        }
      >
        {caption}
      </caption>
      <thead role="rowgroup" className="max-wide:sr-only">
        <tr role="row">
          {columns.map((column) => (
            <th
              key={column.key}
              role="columnheader"
              scope="col"
              className={`sticky top-0 z-10 border-b-2 border-ink bg-card px-3 py-2.5 align-bottom text-xs font-bold text-soft first:rounded-tl-ticket first:pl-5 last:rounded-tr-ticket last:pr-5 print:static ${column.align === "figure" ? "text-right" : ""} ${scrolls && column.head ? "left-0 z-20" : ""}`}
            >
              {column.header}
            </th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="max-wide:grid max-wide:gap-2.5">
        {rows.map((row, line) => (
          <tr
            key={rowKey(row)}
            role="row"
            className="max-wide:block max-wide:rounded-ticket max-wide:border max-wide:border-rule max-wide:bg-card max-wide:px-4 max-wide:py-3 wide:not-last:border-b wide:not-last:border-rule print:break-inside-avoid"
          >
            {columns.map((column, at) => {
              const Cell = column.head ? "th" : "td";
              return (
                <Cell
                  key={column.key}
                  role={column.head ? "rowheader" : "cell"}
                  scope={column.head ? "row" : undefined}
                  className={`align-baseline max-wide:flex max-wide:justify-between max-wide:gap-4 wide:px-3 wide:py-2.5 wide:first:pl-5 wide:last:pr-5 ${column.head ? "font-bold max-wide:mb-1 max-wide:text-lg" : `max-wide:py-0.5 ${aligned(column)}`} ${scrolls && column.head ? "wide:sticky wide:left-0 wide:bg-card" : ""} ${narrow(column)}`}
                >
                  {content(column, cells[line]?.[at], padding[at]?.[line])}
                </Cell>
              );
            })}
          </tr>
        ))}
      </tbody>
      {hasFooter ? (
        <tfoot role="rowgroup" className="max-wide:mt-2.5 max-wide:block">
          <tr
            role="row"
            className="max-wide:block max-wide:rounded-ticket max-wide:border-2 max-wide:border-ink max-wide:bg-card max-wide:px-4 max-wide:py-3"
          >
            {columns.map((column, at) => (
              <td
                key={column.key}
                role="cell"
                className={`align-baseline font-bold max-wide:flex max-wide:justify-between max-wide:gap-4 max-wide:py-0.5 wide:border-t-2 wide:border-ink wide:px-3 wide:py-2.5 wide:first:pl-5 wide:last:pr-5 ${column.head ? "max-wide:text-lg" : aligned(column)} ${column.footer === undefined ? "max-wide:hidden" : ""} ${scrolls && column.head ? "wide:sticky wide:left-0 wide:bg-card" : ""} ${narrow(column)}`}
              >
                {content(column, column.footer, padding[at]?.[rows.length])}
              </td>
            ))}
          </tr>
        </tfoot>
      ) : null}
    </table>
  );

  const frame = "wide:rounded-ticket wide:border wide:border-rule wide:bg-card print:border-0";
  return scrolls ? (
    <div
      role="region"
      aria-label={typeof caption === "string" ? caption : "Table"}
      tabIndex={0}
      className={`${frame} wide:max-h-[85dvh] wide:overflow-auto print:max-h-none print:overflow-visible`}
    >
      {table}
    </div>
  ) : (
    <div className={frame}>{table}</div>
  );
}
