import { DataTable } from "@/components/ui/data-table";
import { formatMilligrams } from "@/lib/core/mass";
import { formatClock, formatDay } from "@/lib/core/time";
import type { ScaleCheckView } from "@/lib/scales/queries/checks";

type Props = {
  /** Newest first. */
  checks: readonly ScaleCheckView[];
  timeZone: string;
};

/** Every check of a scale. */
export function CheckTable({ checks, timeZone }: Props) {
  return (
    <DataTable
      caption="Checks, newest first"
      rows={checks}
      rowKey={({ id }) => id}
      columns={[
        {
          key: "day",
          header: "When",
          head: true,
          cell: (check) => `${formatDay(check.day)}, ${formatClock(check.occurredAt, timeZone)}`,
        },
        { key: "weight", header: "Weight", cell: ({ weightName }) => weightName },
        {
          key: "mass",
          header: "Mass, kg",
          align: "figure",
          cell: (check) => formatMilligrams(check.massMilligrams),
        },
        {
          key: "shown",
          header: "Shown, kg",
          align: "figure",
          cell: (check) => formatMilligrams(check.readingMilligrams),
        },
        {
          key: "error",
          header: "Error, g",
          align: "figure",
          cell: (check) => grams(check.readingMilligrams - check.massMilligrams),
        },
        {
          key: "limit",
          header: "Limit, ± g",
          align: "figure",
          cell: (check) => grams(check.limitMilligrams),
        },
        {
          key: "passed",
          header: "Result",
          cell: (check) => (
            <span className={check.passed ? "text-ok" : "font-bold text-bad"}>
              {check.passed ? "Within" : "Beyond"}
              {check.attempt > 1 ? `, try ${check.attempt}` : ""}
            </span>
          ),
        },
        { key: "by", header: "By", cell: ({ byName }) => byName },
      ]}
    />
  );
}

/** Milligrams as grams, with as many decimals as the value needs: "−5", "0.5". */
function grams(milligrams: number): string {
  const size = Math.abs(milligrams);
  const fraction = String(size % 1000)
    .padStart(3, "0")
    .replace(/0+$/, "");
  const sign = milligrams < 0 ? "\u2212" : "";
  return `${sign}${Math.floor(size / 1000)}${fraction === "" ? "" : `.${fraction}`}`;
}
