"use client";

import { useQuery } from "@tanstack/react-query";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import type { scalesTodayEndpoint } from "@/lib/scales/contract/checks";
import { CONFIRMED_STATES, SCALE_DAY_WORDS, SCALES_TODAY_ADDRESS } from "@/lib/scales/terms";

type Props = { scaleId: string; onScale: (id: string) => void };

const LINK = "link inline-flex min-h-11 items-center font-bold";

/**
 * How the chosen scale stands today, under its field. Where it was not confirmed, another that was is offered first; nothing
 * keeps anybody from weighing on. Without signal it says nothing.
 */
export function ScaleToday({ scaleId, onScale }: Props) {
  const { data } = useQuery({
    queryKey: ["scales", "today"],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof scalesTodayEndpoint>(SCALES_TODAY_ADDRESS, {}, signal),
    refetchInterval: 300_000,
  });
  const own = data?.items.find((scale) => scale.scaleId === scaleId);
  if (!own) return null;
  if (CONFIRMED_STATES.includes(own.state)) {
    return <p className="mt-1 text-sm text-ok">{SCALE_DAY_WORDS[own.state]}</p>;
  }
  const other = data?.items.find(({ state }) => CONFIRMED_STATES.includes(state));
  return (
    <div className="mt-2 flex flex-wrap items-center gap-x-4 rounded-control border border-warn bg-warn-soft px-3 py-0.5">
      <strong className="text-warn">{SCALE_DAY_WORDS[own.state]}</strong>
      {other ? (
        <button type="button" className={LINK} onClick={() => onScale(other.scaleId)}>
          Use {other.name}
        </button>
      ) : null}
      {own.state === "failed" ? null : (
        <a className={LINK} href={`/scales/${scaleId}`}>
          Check it now
        </a>
      )}
    </div>
  );
}
