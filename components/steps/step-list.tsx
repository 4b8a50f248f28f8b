import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { StepSummary } from "@/lib/stock/contract/steps";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";

type Props = { steps: readonly StepSummary[]; timeZone: string };

function Lots({ numbers }: { numbers: readonly number[] }) {
  return (
    <span className="flex flex-wrap gap-x-3 max-wide:justify-end">
      {numbers.map((number) => (
        <Link
          key={number}
          href={`/stock/lots/${number}`}
          className="link inline-flex min-h-11 items-center"
        >
          Lot {number}
        </Link>
      ))}
    </span>
  );
}

/** Steps, newest first. */
export function StepList({ steps, timeZone }: Props) {
  return (
    <DataTable
      caption="Steps, newest first"
      rows={steps}
      rowKey={(step) => step.stepId}
      empty={
        <EmptyState title="No step yet">
          Washing, drying and shredding turn a lot into another form; what each loses is kept here.
        </EmptyState>
      }
      columns={[
        {
          key: "what",
          header: "Step",
          head: true,
          cell: ({ stepId, kind, polymer, state }) => (
            <Link
              href={`/steps/${stepId}`}
              className="link inline-flex min-h-11 items-center font-bold"
            >
              {STEP_KIND_NAMES[kind]} {POLYMER_NAMES[polymer].name}
              {state === "posted" ? "" : `, ${state}`}
            </Link>
          ),
        },
        {
          key: "when",
          header: "When",
          cell: ({ occurredAt, byName }) =>
            `${formatDay(dayOf(instant(occurredAt), timeZone))}, ${byName}`,
        },
        { key: "from", header: "From", cell: ({ fromNumbers }) => <Lots numbers={fromNumbers} /> },
        { key: "to", header: "To", cell: ({ toNumbers }) => <Lots numbers={toNumbers} /> },
        { key: "in", header: "In, kg", align: "figure", cell: (step) => formatKg(step.inputGrams) },
        {
          key: "out",
          header: "Out, kg",
          align: "figure",
          cell: (step) => formatKg(step.outputGrams),
        },
        {
          key: "lost",
          header: "Lost, kg",
          align: "figure",
          cell: (step) => formatKg(step.lossGrams),
        },
      ]}
    />
  );
}
