import Link from "next/link";
import type { Route } from "next";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { formatClock, formatDay } from "@/lib/core/time";
import type { Unconfirmed, UnconfirmedRecord } from "@/lib/reports/queries/unconfirmed-readings";
import { ClearDialog } from "./clear-dialog";

type Props = { unconfirmed: Unconfirmed; scaleId: string; scaleName: string; timeZone: string };

const WORDS: Partial<Record<UnconfirmedRecord["kind"], string>> = {
  "weigh-in": "Weigh-in",
  sort: "Sorting",
  step: "Step",
  count: "Count",
  removal: "Taken away",
  opening: "Opening count",
  identify: "Identified",
  move: "Moved",
};

function placeOf({ kind, subject, code }: UnconfirmedRecord): string | null {
  if (code !== null) return `/bags/${code}`;
  return kind === "removal" ? `/removals/${subject.slice("removal:".length)}` : null;
}

/** "12 × weigh-in, 4 × sorting" */
function countWords(records: readonly UnconfirmedRecord[]): string {
  const counts = new Map<string, number>();
  for (const { kind } of records) {
    const word = (WORDS[kind] ?? kind).toLowerCase();
    counts.set(word, (counts.get(word) ?? 0) + 1);
  }
  return [...counts].map(([word, count]) => `${count} × ${word}`).join(", ");
}

/** Readings of days on which this scale was not confirmed, for a lead to look at. */
export function UnconfirmedDays({ unconfirmed, scaleId, scaleName, timeZone }: Props) {
  return (
    <section aria-label="Readings to look at" className="mt-9 max-w-3xl">
      <h2 className="mb-1 text-xl">Readings to look at</h2>
      <p className="mb-3 text-soft">
        Weighed in the last month while this scale was not confirmed.
      </p>
      {unconfirmed.days.length === 0 ? <p className="text-soft">None.</p> : null}
      <div className="grid gap-3">
        {unconfirmed.days.map(({ day, grams, records }) => (
          <Ticket key={day} as="section" label={formatDay(day)}>
            <div className="flex flex-wrap items-center justify-between gap-3">
              <h3 className="text-lg">
                {formatDay(day)}, <span className="font-mono">{formatKg(grams)}</span> kg
              </h3>
              <ClearDialog
                scaleId={scaleId}
                scaleName={scaleName}
                day={day}
                label="Clear this day"
              />
            </div>
            <details className="mt-1">
              <summary className="min-h-11 cursor-pointer py-2.5 text-soft">
                {countWords(records)}
              </summary>
              <ul className="grid border-t border-rule pt-1">
                {records.map((record) => {
                  const place = placeOf(record);
                  const words = `${WORDS[record.kind] ?? record.kind}${record.code ? ` ${formatCode(record.code)}` : ""}`;
                  return (
                    <li
                      key={`${record.kind}:${record.subject}`}
                      className="flex min-h-11 flex-wrap items-center justify-between gap-x-4"
                    >
                      <span>
                        <span className="font-mono text-sm text-soft">
                          {formatClock(record.occurredAt, timeZone)}
                        </span>{" "}
                        {place ? (
                          <Link
                            href={place as Route}
                            className="link inline-flex min-h-11 items-center"
                          >
                            {words}
                          </Link>
                        ) : (
                          words
                        )}
                      </span>
                      <span className="font-mono">{formatKg(record.grams)}</span>
                    </li>
                  );
                })}
              </ul>
            </details>
          </Ticket>
        ))}
      </div>
      {unconfirmed.more ? (
        <p className="mt-3 font-bold text-warn">
          There are more; clear or mend these first, then the others show.
        </p>
      ) : null}
    </section>
  );
}
