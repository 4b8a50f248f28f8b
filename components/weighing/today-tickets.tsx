"use client";

import { UNREACHABLE_SENTENCE, ProblemError } from "@/components/forms/problem-document";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import { formatKg } from "@/lib/core/mass";
import { TicketRow } from "./ticket-row";
import { useToday } from "./use-today";

type Props = {
  /** How many tickets are shown; the sums are of all. */
  limit: number;
  /** Above the list; the day's page has its own. */
  heading?: string;
};

/** Today's tickets, newest first, with undo for ten minutes. */
export function TodayTickets({ limit, heading }: Props) {
  const { data: today, error, isLoading } = useToday(limit);
  return (
    <section aria-label="Today's tickets" className="mt-8 rail:mt-0">
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-4">
        {heading ? <h2 className="text-xl">{heading}</h2> : null}
        {today ? (
          <p className="text-sm text-soft">
            {today.bags === 1 ? "1 bag" : `${today.bags} bags`},{" "}
            <span className="font-mono tracking-tighter text-ink">{formatKg(today.netGrams)}</span>{" "}
            kg
          </p>
        ) : null}
      </div>
      {error && !today ? (
        <Notice tone="bad" title="No list" live="status">
          {error instanceof ProblemError ? error.problem.detail : UNREACHABLE_SENTENCE}
        </Notice>
      ) : null}
      {isLoading ? <Skeleton shape="tickets" count={3} label="Loading today's tickets" /> : null}
      {today && today.tickets.length === 0 ? (
        <p className="rounded-ticket border-2 border-dashed border-rule px-5 py-6 text-center text-soft">
          <strong className="block text-ink">No bag weighed in today</strong>
          Each bag that is saved shows here, and can be undone for ten minutes.
        </p>
      ) : null}
      {today && today.tickets.length > 0 ? (
        <ul className="grid gap-2">
          {today.tickets.map((ticket) => (
            <TicketRow
              key={ticket.id}
              ticket={ticket}
              zone={today.timeZone}
              clockAheadMs={today.clockAheadMs}
            />
          ))}
        </ul>
      ) : null}
      {today && today.ticketCount > today.tickets.length ? (
        <p className="mt-2 text-sm text-soft">
          The newest {today.tickets.length} of {today.ticketCount} tickets.
        </p>
      ) : null}
    </section>
  );
}
