import { ButtonAnchor } from "@/components/ui/button-anchor";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { formatKg } from "@/lib/core/mass";
import { formatDay } from "@/lib/core/time";
import type { Report } from "@/lib/reports/queries/report";
import { diversionOf, formatShare } from "@/lib/reports/rules/balance";
import { exportQuery } from "@/lib/reports/rules/csv-headers";
import { lastDayOf, periodTitle } from "@/lib/reports/rules/periods";
import type { Grouping } from "@/lib/reports/terms";
import { BalanceTable } from "./balance-table";
import { BalanceTicket } from "./balance-ticket";
import { ReportForm } from "./report-form";
import { SortedChart } from "./sorted-chart";
import { WeighedFigures } from "./weighed-figures";

type Props = {
  report: Report;
  by: readonly Grouping[];
  page: number;
  mayExport: boolean;
  /** Days were asked for that make no period; the present month is shown. */
  wrongDays: boolean;
};

function Lead({ report }: { report: Report }) {
  const { period, points, total } = report;
  const rate = diversionOf(total);
  return (
    <>
      {formatDay(period.from)} to {formatDay(lastDayOf(period))}. {points}{" "}
      {points === 1 ? "drop-off point" : "drop-off points"}, {total.bags}{" "}
      {total.bags === 1 ? "bag" : "bags"}.{" "}
      <strong className="text-ink">Diverted {formatKg(total.diverted, 1)} kg</strong>
      {rate ? `, rate ${formatShare(rate)}.` : "; nothing has left the shed yet."}
    </>
  );
}

/** The report of a period: its mass balance, what was sorted, the same broken down, and the files. */
export function ReportPage({ report, by, page, mayExport, wrongDays }: Props) {
  const { period, verified } = report;
  const query = exportQuery(period, by);
  const plain = exportQuery(period, []);
  return (
    <>
      <PageHeader
        title={periodTitle(period)}
        lead={<Lead report={report} />}
        actions={
          mayExport ? (
            <ButtonAnchor href={`/api/reports/balance.csv${query}`} download>
              Export CSV
            </ButtonAnchor>
          ) : null
        }
      />
      <ReportForm
        period={period}
        by={by}
        today={report.today}
        error={wrongDays ? "The last day must not be before the first." : undefined}
      />
      {verified.result?.ok === false ? (
        <Notice tone="bad" title="The ledger's last verification failed" className="mb-5">
          These figures cannot be relied on until that is cleared up. A coordinator sees the first
          bad entry under Audit.
        </Notice>
      ) : null}
      <div className="grid items-start gap-6 rail:grid-cols-[minmax(0,37rem)_minmax(0,1fr)]">
        <BalanceTicket report={report} />
        <SortedChart chart={report.chart} />
      </div>
      <WeighedFigures report={report} />
      <BalanceTable report={report} by={by} page={page} />
      <footer className="mt-8 border-t border-rule pt-4 text-sm text-soft">
        {mayExport ? (
          <p className="mb-2 flex flex-wrap gap-x-6 print:hidden">
            <a
              className="link inline-flex min-h-11 items-center font-bold"
              href={`/api/reports/movements.csv${plain}`}
              download
            >
              Every movement as CSV
            </a>
            <a
              className="link inline-flex min-h-11 items-center font-bold"
              href={`/api/reports/balance.csv-metadata.json${query}`}
            >
              Definitions of the columns
            </a>
          </p>
        ) : null}
        <p className="break-all">
          Ledger entry {report.head.entryId}
          {report.head.hash ? `, sealed ${report.head.hash.slice(0, 16)}` : ""}.{" "}
          {verified.at === null
            ? "Not verified yet."
            : `Last verified ${formatDay(report.verifiedDay ?? report.today)}.`}
        </p>
      </footer>
    </>
  );
}
