import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { formatStep } from "@/lib/core/mass";
import { formatDay } from "@/lib/core/time";
import type { Unconfirmed } from "@/lib/reports/queries/unconfirmed-readings";
import type { CheckWeight, ScaleToday } from "@/lib/scales/contract/checks";
import type { ScaleHistory } from "@/lib/scales/queries/checks";
import { CONFIRMED_STATES, SCALE_DAY_WORDS } from "@/lib/scales/terms";
import { CheckForm } from "./check-form";
import { CheckHistory } from "./check-history";
import { CheckTable } from "./check-table";
import { ClearDialog } from "./clear-dialog";
import { UnconfirmedDays } from "./unconfirmed-days";

type Props = {
  history: ScaleHistory;
  weights: readonly CheckWeight[];
  /** Other scales as they stand today. */
  others: readonly ScaleToday[];
  /** null for whoever does not review. */
  unconfirmed: Unconfirmed | null;
  drawnWeight: string | undefined;
  timeZone: string;
};

/** One scale: today's check, and how it has been over time. */
export function ScalePage({ history, weights, others, unconfirmed, drawnWeight, timeZone }: Props) {
  const { scale, today, state, checks, clearances } = history;
  const confirmed = CONFIRMED_STATES.includes(state);
  return (
    <>
      <PageHeader
        title={scale.name}
        lead={`Carries ${formatStep(scale.maxMilligrams)}, shows steps of ${formatStep(scale.dMilligrams)}.`}
        back={{ href: "/scales", label: "Back to scales" }}
      />
      <div className="grid items-start gap-x-10 gap-y-7 rail:grid-cols-[minmax(0,24rem)_minmax(0,1fr)]">
        <Ticket
          as="section"
          label="Today"
          stub={
            <div className="flex flex-wrap items-center justify-between gap-3">
              <p className="font-heading text-xl font-bold">
                <span className={confirmed ? "text-ok" : "text-warn"}>
                  {scale.retiredAt === null ? SCALE_DAY_WORDS[state] : "Retired"}
                </span>
              </p>
              {unconfirmed && !confirmed && scale.retiredAt === null ? (
                <ClearDialog
                  scaleId={scale.id}
                  scaleName={scale.name}
                  day={today}
                  label="Clear it for today"
                />
              ) : null}
            </div>
          }
        >
          {scale.retiredAt === null ? (
            <CheckForm scaleId={scale.id} state={state} weights={weights} others={others} />
          ) : (
            <p>Nothing is weighed on it any more.</p>
          )}
        </Ticket>
        <div className="min-w-0">
          <h2 className="mb-3 text-xl">Over time</h2>
          <CheckHistory scaleId={scale.id} checks={checks} weightId={drawnWeight} />
        </div>
      </div>
      {checks.length > 0 ? (
        <div className="mt-7">
          <CheckTable checks={checks} timeZone={timeZone} />
        </div>
      ) : null}
      {clearances.length > 0 ? (
        <section aria-label="Cleared days" className="mt-7 max-w-[70ch]">
          <h2 className="mb-2 text-xl">Cleared days</h2>
          <ul className="grid gap-1.5">
            {clearances.map(({ day, note, byName }) => (
              <li key={day} className="wrap-anywhere">
                <strong>{formatDay(day)}</strong> by {byName}: {note}
              </li>
            ))}
          </ul>
        </section>
      ) : null}
      {unconfirmed ? (
        <UnconfirmedDays
          unconfirmed={unconfirmed}
          scaleId={scale.id}
          scaleName={scale.name}
          timeZone={timeZone}
        />
      ) : null}
    </>
  );
}
