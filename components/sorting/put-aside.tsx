"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import { GiveUpDialog, type GivenUp } from "./give-up-dialog";
import { listKept } from "./kept-tables";
import { namesTogether } from "./session-notices";
import { useDrafts } from "./use-table";

type Props = {
  /** Whose session this is. */
  helperId: string;
  timeZone: string;
  /** The program's clock. */
  now: number;
};

/** "K7Q2-9F4M" or "K7Q2-9F4M and 4 more". */
function bagWords(codes: readonly string[]): string {
  const [first, ...rest] = codes;
  if (first === undefined) return "No bag";
  return rest.length === 0 ? formatCode(first) : `${formatCode(first)} and ${rest.length} more`;
}

/** Sessions that were put aside, on the server and on this device only. */
export function PutAside({ helperId, timeZone, now }: Props) {
  const cache = useQueryClient();
  const { data: drafts } = useDrafts();
  const [givingUp, setGivingUp] = useState<GivenUp | null>(null);
  if (!drafts) return null;
  const here = listKept(helperId);
  const onlyHere = here.filter(
    ({ id, table: { draft } }) =>
      !drafts.some((one) => one.id === id) && draft.piles.length + draft.rejects.length > 0,
  );
  if (drafts.length + onlyHere.length === 0) return null;
  const when = (at: number) => {
    const [on, today] = [instant(at), dayOf(instant(now), timeZone)];
    const day = dayOf(on, timeZone);
    return day === today
      ? formatClock(on, timeZone)
      : `${formatDay(day)}, ${formatClock(on, timeZone)}`;
  };
  const row = ({
    id,
    codes,
    words,
    soft,
    giveUp,
  }: {
    id: string;
    codes: readonly string[];
    words: string;
    soft: string;
    giveUp: GivenUp;
  }) => (
    <li
      key={id}
      className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-rule px-4 py-3 last:border-0"
    >
      <div className="min-w-0 grow basis-52">
        <p className="font-mono font-bold tracking-tighter">{bagWords(codes)}</p>
        <p className="text-sm text-soft">{soft}</p>
        {words ? <p className="text-sm font-bold text-warn">{words}</p> : null}
      </div>
      <div className="flex gap-2.5 max-wide:grow max-wide:*:grow">
        <Button variant="link" size="small" onClick={() => setGivingUp(giveUp)}>
          Give up
        </Button>
        <ButtonLink href={`/sorting/table/${id}`} variant="quiet" size="small">
          Take up
        </ButtonLink>
      </div>
    </li>
  );
  return (
    <section aria-label="Put aside" className="mt-6">
      <h2 className="mb-2 text-lg">On a table, or put aside</h2>
      <Ticket padding="none">
        <ul>
          {drafts.map(({ id, version, codes, netGrams, changedBy, changedAt, others }) =>
            row({
              id,
              codes,
              words:
                others.length === 0
                  ? ""
                  : `${namesTogether(others.map(({ name }) => name))} ${others.length === 1 ? "has" : "have"} it open now`,
              soft: `${codes.length === 1 ? "1 bag" : `${codes.length} bags`}, ${formatKg(netGrams)} kg; ${changedBy.name}, ${when(changedAt)}`,
              giveUp: { id, version },
            }),
          )}
          {onlyHere.map(({ id, table }) =>
            row({
              id,
              codes: table.codes,
              words: "Kept on this phone only",
              soft: table.codes.length === 1 ? "1 bag" : `${table.codes.length} bags`,
              giveUp: { id, version: null },
            }),
          )}
        </ul>
      </Ticket>
      {givingUp ? (
        <GiveUpDialog
          given={givingUp}
          helperId={helperId}
          onClose={() => {
            setGivingUp(null);
            void cache.invalidateQueries({ queryKey: ["sorting"] });
          }}
        />
      ) : null}
    </section>
  );
}
