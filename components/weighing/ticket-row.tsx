"use client";

import Link from "next/link";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { formatClock, type Instant } from "@/lib/core/time";
import type { Ticket as WeighTicket } from "@/lib/weighing/contract/weigh-ins";
import { CONDITION_NAMES } from "@/lib/weighing/terms";
import { UndoButton } from "./undo-button";

type Props = { ticket: WeighTicket; zone: string; clockAheadMs: number };

/** One weigh ticket of today. */
export function TicketRow({ ticket, zone, clockAheadMs }: Props) {
  const gone = ticket.state === "undone" || ticket.state === "discarded";
  const { undoUntil } = ticket;
  return (
    <Ticket as="li" padding="none" className={gone ? "bg-paper" : ""}>
      <div className="px-4 py-3">
        <div className="flex items-start justify-between gap-3">
          <div className="min-w-0">
            <Link
              href={`/bags/${ticket.code}`}
              prefetch={false}
              className="link -my-2.5 inline-flex min-h-11 items-center font-mono font-bold tracking-tighter"
            >
              {formatCode(ticket.code)}
            </Link>
            <span className="block text-sm break-words text-soft">
              {ticket.pointName}, {formatClock(ticket.recordedAt as Instant, zone)}
              {ticket.mine ? "" : `, ${ticket.byName}`}
            </span>
          </div>
          <span
            className={`shrink-0 font-mono text-lg font-bold tracking-tighter ${gone ? "text-soft line-through" : ""}`}
          >
            {formatKg(ticket.netGrams)} kg
          </span>
        </div>
        <div className="mt-1 flex flex-wrap items-center justify-between gap-x-3 gap-y-1">
          <span className="text-sm text-soft">{ticketWords(ticket)}</span>
          <Link
            href={`/weigh-ins/${ticket.id}`}
            prefetch={false}
            className="link -my-2 inline-flex min-h-11 items-center text-sm font-bold"
          >
            See the ticket<span className="sr-only"> of {formatCode(ticket.code)}</span>
          </Link>
          {undoUntil !== null ? (
            <UndoButton ticket={{ ...ticket, undoUntil }} clockAheadMs={clockAheadMs} />
          ) : null}
        </div>
      </div>
    </Ticket>
  );
}

/** "to sort, dirty", "HDPE, Blue, in lot 12, clean", "kept for review". */
function ticketWords(ticket: WeighTicket): string {
  if (ticket.state === "undone") return "Undone";
  if (ticket.state === "discarded") return "Second reading, undone";
  if (ticket.state === "for-review") return "Second reading, kept for review";
  const named = ticket.polymer === "mixed" ? [] : [POLYMER_NAMES[ticket.polymer].name];
  const words = [
    ...named,
    ...(ticket.colourName ? [ticket.colourName.toLowerCase()] : []),
    ticket.lotNumber === null ? "to sort" : `in lot ${ticket.lotNumber}`,
    CONDITION_NAMES[ticket.condition].toLowerCase(),
    ...(ticket.belowMinimum ? ["under the scale's minimum"] : []),
  ].join(", ");
  return words.charAt(0).toUpperCase() + words.slice(1);
}
