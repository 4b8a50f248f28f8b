import Link from "next/link";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { Icon } from "@/components/ui/icon";
import { TextField } from "@/components/ui/text-field";
import type { Day, Period } from "@/lib/core/time";
import { lastDayOf, shortcuts } from "@/lib/reports/rules/periods";
import { reportValues } from "@/lib/reports/rules/report-query";
import { GROUPING_NAMES, GROUPINGS, type Grouping } from "@/lib/reports/terms";

type Props = { period: Period; by: readonly Grouping[]; today: Day; error?: string | undefined };

/** Which days, and broken down by what. A plain form that reads: its address can be kept and shared. */
export function ReportForm({ period, by, today, error }: Props) {
  return (
    <details
      className="mb-5 rounded-ticket border border-rule bg-card print:hidden"
      open={Boolean(error)}
    >
      <summary className="flex min-h-13 cursor-pointer items-center gap-2 px-4 font-bold text-act wide:px-5">
        <Icon name="add" size={20} />
        Choose days and rows
      </summary>
      <div className="border-t border-rule px-4 py-4 wide:px-5">
        <ul className="mb-4 flex flex-wrap gap-x-5" aria-label="Usual periods">
          {shortcuts(today).map((shortcut) => (
            <li key={shortcut.name}>
              <Link
                href={{ pathname: "/reports", query: reportValues(shortcut.period, by) }}
                className="link inline-flex min-h-11 items-center font-bold"
              >
                {shortcut.name}
              </Link>
            </li>
          ))}
        </ul>
        {/* A key, so that a shortcut's days replace what stood in the fields. */}
        <form action="/reports" key={`${period.from}${period.until}${by.join()}`}>
          <div className="grid grid-cols-2 gap-3 wide:max-w-md">
            <TextField
              label="First day"
              type="date"
              name="from"
              defaultValue={period.from}
              required
              error={error}
            />
            <TextField
              label="Last day"
              type="date"
              name="to"
              defaultValue={lastDayOf(period)}
              required
            />
          </div>
          <fieldset className="mt-4">
            <legend className="text-sm font-bold">A row for each</legend>
            <div className="flex flex-wrap gap-x-7">
              {GROUPINGS.map((grouping) => (
                <CheckField
                  key={grouping}
                  label={GROUPING_NAMES[grouping]}
                  name="by"
                  value={grouping}
                  defaultChecked={by.includes(grouping)}
                />
              ))}
            </div>
          </fieldset>
          <Button type="submit" variant="quiet" className="mt-3">
            Show these days
          </Button>
        </form>
      </div>
    </details>
  );
}
