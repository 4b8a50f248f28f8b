"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import { BASIS_NAMES } from "@/lib/ledger/terms";
import type { acceptCountEndpoint, CountView } from "@/lib/stock/contract/counts";
import { COUNT_KIND_NAMES } from "@/lib/stock/terms";
import { ACCEPT_COUNT } from "./addresses";
import { CorrectCountDialog } from "./correct-count-dialog";
import { LaterUses } from "../ledger/later-uses";
import type { LaterUses as Later } from "@/lib/core/schemas";
import { RefusalNotice } from "./refusal-notice";

type Props = { counts: readonly CountView[]; timeZone: string };

function CountToReview({
  count,
  timeZone,
  onCorrect,
}: {
  count: CountView;
  timeZone: string;
  onCorrect: () => void;
}) {
  const router = useRouter();
  const accept = useCommand<typeof acceptCountEndpoint>(ACCEPT_COUNT);
  const off = count.countedGrams - count.bookGrams;

  async function press() {
    const result = await accept.send({ id: count.countId });
    if (result.kind === "done") router.refresh();
  }

  return (
    <li className="grid gap-3 rounded-ticket border border-rule bg-card px-4 py-3">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <span className="min-w-0">
          <Link
            href={`/stock/lots/${count.number}`}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Lot {count.number}
          </Link>
          <span className="block text-sm text-soft">{count.material}</span>
        </span>
        <span className="font-mono text-xl font-bold whitespace-nowrap">
          {off === 0 ? "±" : off > 0 ? "+" : "\u2212"}
          {formatKg(Math.abs(off))} kg
        </span>
      </div>
      <p>
        {COUNT_KIND_NAMES[count.kind]}: {formatKg(count.countedGrams)} kg where the book held{" "}
        {formatKg(count.bookGrams)} kg. {count.byName},{" "}
        {formatDay(dayOf(instant(count.occurredAt), timeZone))},{" "}
        {formatClock(instant(count.occurredAt), timeZone)}.{" "}
        <span className="text-soft">
          {BASIS_NAMES[count.basis]}
          {count.scaleName === null ? "" : `, ${count.scaleName}`}
        </span>
      </p>
      <RefusalNotice command={accept} />
      <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
        <Button variant="quiet" busy={accept.pending} onClick={() => void press()}>
          Let it stand
        </Button>
        <Button variant="quiet" onClick={onCorrect}>
          Correct
        </Button>
      </div>
    </li>
  );
}

/** Counts that nobody has looked at yet. */
export function CountsReview({ counts, timeZone }: Props) {
  const router = useRouter();
  const [correcting, setCorrecting] = useState<CountView | null>(null);
  const [later, setLater] = useState<Later | null>(null);
  return (
    <QueryProvider>
      {later ? (
        <div className="mb-4">
          <LaterUses later={later} title="Corrected" timeZone={timeZone} />
        </div>
      ) : null}
      {counts.length === 0 ? (
        <EmptyState title="No count waits">
          What volunteers count stands here until a lead has looked at it.
        </EmptyState>
      ) : (
        <ul className="grid gap-3 rail:max-w-3xl">
          {counts.map((count) => (
            <CountToReview
              key={count.countId}
              count={count}
              timeZone={timeZone}
              onCorrect={() => setCorrecting(count)}
            />
          ))}
        </ul>
      )}
      {correcting ? (
        <CorrectCountDialog
          count={correcting}
          onSaved={(receipt) => {
            setCorrecting(null);
            setLater(receipt.later);
            router.refresh();
          }}
          onClose={() => setCorrecting(null)}
        />
      ) : null}
    </QueryProvider>
  );
}
