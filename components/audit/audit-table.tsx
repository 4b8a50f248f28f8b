import { ButtonAnchor } from "@/components/ui/button-anchor";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import type { AuditRow, SearchAudit } from "@/lib/audit/contract";
import { actionWords, auditAddress, fieldWords } from "@/lib/audit/rules";
import { dayOf, formatClock, formatDay, instant } from "@/lib/core/time";

type Props = {
  rows: readonly AuditRow[];
  next: string | null;
  query: SearchAudit;
  timeZone: string;
};

function Changed({ row }: { row: AuditRow }) {
  const fields = [
    ...Object.entries(row.fields).map(([field, value]) => ({ field, value: String(value ?? "–") })),
    ...row.personal.map(({ field, value }) => ({ field, value: value ?? "erased" })),
  ].filter(({ value }) => value !== "");
  if (fields.length === 0) return <>–</>;
  return (
    <dl className="grid gap-x-3 text-sm wide:grid-cols-[auto_1fr]">
      {fields.map(({ field, value }) => (
        <div key={field} className="contents">
          <dt className="text-soft">{fieldWords(field)}</dt>
          <dd className="min-w-0 font-mono break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}

/** One row for each action, newest first; what changed stands in it, nothing has to be opened. */
export function AuditTable({ rows, next, query, timeZone }: Props) {
  return (
    <>
      <DataTable
        caption="Actions, newest first"
        rows={rows}
        rowKey={(row) => row.id}
        columns={[
          {
            key: "action",
            header: "What",
            head: true,
            cell: (row) => actionWords(row.action),
          },
          {
            key: "at",
            header: "When",
            cell: (row) => {
              const at = instant(row.at);
              return `${formatDay(dayOf(at, timeZone))}, ${formatClock(at, timeZone)}`;
            },
          },
          { key: "by", header: "By", cell: (row) => row.actor?.name ?? "the program" },
          {
            key: "subject",
            header: "Record",
            cell: (row) => (
              <span className="text-sm">
                {fieldWords(row.subjectKind)}{" "}
                <span className="font-mono break-all text-soft">{row.subjectId}</span>
                {row.actId === null ? null : (
                  <span className="block text-soft">ledger act {row.actId}</span>
                )}
              </span>
            ),
          },
          { key: "changed", header: "What changed", cell: (row) => <Changed row={row} /> },
        ]}
        empty={
          <EmptyState title="Nothing fits this search">
            Leave a field empty, or take more days.
          </EmptyState>
        }
      />
      {next === null ? null : (
        <p className="mt-4">
          <ButtonAnchor href={auditAddress(query, next)} variant="quiet">
            Older actions
          </ButtonAnchor>
        </p>
      )}
    </>
  );
}
