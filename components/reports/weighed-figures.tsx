import { DataTable } from "@/components/ui/data-table";
import { Figure } from "@/components/ui/figure";
import { formatKg } from "@/lib/core/mass";
import { formatMonth } from "@/lib/core/time";
import { BASIS_NAMES } from "@/lib/ledger/terms";
import type { Report, Weighed } from "@/lib/reports/queries/report";
import { formatShare, rejectShareOf } from "@/lib/reports/rules/balance";

const plusMinus = (weighed: Weighed): string => `±\u2009${formatKg(weighed.expandedGrams)}`;

function WeighedFigure({ label, weighed }: { label: string; weighed: Weighed }) {
  return (
    <Figure
      label={label}
      value={formatKg(weighed.grams)}
      unit="kg"
      note={
        <>
          <span className="block font-mono">{plusMinus(weighed)} kg</span>
          {weighed.byBasis.map(({ basis, grams }) => (
            <span key={basis} className="block">
              {BASIS_NAMES[basis]}: <span className="font-mono">{formatKg(grams)}</span>
            </span>
          ))}
        </>
      }
    />
  );
}

/** Collected, accepted and rejected, with what the scales can tell; by month when there are several. */
export function WeighedFigures({ report }: { report: Report }) {
  const share = rejectShareOf(report.total);
  return (
    <section aria-label="Collected and accepted" className="mt-8">
      <div className="flex flex-wrap gap-x-12 gap-y-5">
        <WeighedFigure label="Collected" weighed={report.collected} />
        <WeighedFigure label="Accepted: sorted into lots" weighed={report.accepted} />
        <Figure
          label="Rejected"
          value={formatKg(report.total.rejected)}
          unit="kg"
          note={share ? `${formatShare(share)} of what was sorted` : "Nothing was sorted"}
        />
      </div>
      {report.months.length > 1 ? (
        <div className="mt-6 max-w-3xl">
          <DataTable
            caption="Collected and accepted by month, in kg"
            showCaption
            rows={report.months}
            rowKey={({ month }) => month}
            columns={[
              {
                key: "month",
                header: "Month",
                head: true,
                cell: ({ month }) => formatMonth(month),
              },
              {
                key: "collected",
                header: "Collected",
                align: "figure",
                cell: ({ collected }) => formatKg(collected.grams),
              },
              {
                key: "collected-u",
                header: "can be off by",
                align: "figure",
                cell: ({ collected }) => plusMinus(collected),
              },
              {
                key: "accepted",
                header: "Accepted",
                align: "figure",
                cell: ({ accepted }) => formatKg(accepted.grams),
              },
              {
                key: "accepted-u",
                header: "can be off by",
                align: "figure",
                cell: ({ accepted }) => plusMinus(accepted),
              },
            ]}
          />
        </div>
      ) : null}
    </section>
  );
}
