import type { Metadata } from "next";
import { ReportPage } from "@/components/reports/report-page";
import { pageContext } from "@/lib/http/page-context";
import { may } from "@/lib/platform/context";
import { getReport, presentMonth } from "@/lib/reports/queries/report";
import { monthPeriod } from "@/lib/reports/rules/periods";
import { readReportQuery } from "@/lib/reports/rules/report-query";

export const metadata: Metadata = { title: "Reports" };

export default async function ReportsPage({ searchParams }: PageProps<"/reports">) {
  const ctx = await pageContext("reports.read");
  const { period, wrongDays, by, page } = readReportQuery(await searchParams);
  const report = getReport(ctx, {
    period: period ?? monthPeriod(presentMonth(ctx).month),
    by,
    page,
  });
  return (
    <ReportPage
      report={report}
      by={by}
      page={page}
      mayExport={may(ctx, "reports.export")}
      wrongDays={wrongDays}
    />
  );
}
