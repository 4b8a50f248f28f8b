"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay } from "@/lib/core/time";
import {
  prolongEndpoint,
  releaseEndpoint,
  reserveEndpoint,
  type Reserved,
} from "@/lib/production/contract/reservations";
import type { RunPage } from "@/lib/production/queries/runs";
import { PickLots } from "./pick-lots";

type Props = { page: RunPage; mayPlan: boolean };

/** What is promised to the run, and the buttons that promise, prolong and give back. */
export function ReserveDesk({ page, mayPlan }: Props) {
  const { run, reservations, timeZone } = page;
  const router = useRouter();
  const reserve = useCommand(reserveEndpoint);
  const release = useCommand(releaseEndpoint);
  const prolong = useCommand(prolongEndpoint);
  const [done, setDone] = useState<Reserved | null>(null);
  const lacks =
    run.needGrams -
    reservations.reduce((sum, { grams, shortGrams }) => sum + grams - shortGrams, 0);

  const send = async (lots?: { number: number; grams: number }[]) => {
    const result = await reserve.send({ runId: run.id, ...(lots ? { lots } : {}) });
    if (result.kind !== "done") return false;
    setDone(result.receipt);
    router.refresh();
    return true;
  };
  const giveBack = async (reservationId?: Reservation["id"]) => {
    const result = await release.send({
      runId: run.id,
      ...(reservationId ? { reservationId } : {}),
    });
    setDone(null);
    if (result.kind === "done") router.refresh();
  };
  const lapses = reservations.map(({ lapsesAt }) => lapsesAt).sort((a, b) => a - b)[0];
  return (
    <section aria-label="Reserved" className="mt-6">
      <div className="mb-2 flex flex-wrap items-center justify-between gap-3">
        <h2 className="text-xl">Reserved</h2>
        {mayPlan && lacks > 0 ? (
          <Button size="small" busy={reserve.pending} onClick={() => void send()}>
            Reserve {formatKg(lacks)} kg, oldest lots first
          </Button>
        ) : null}
      </div>
      <div className="grid gap-3 empty:hidden">
        <CommandNotice command={reserve} />
        <CommandNotice command={release} />
        <CommandNotice command={prolong} />
        {done ? <Promised done={done} page={page} /> : null}
      </div>
      {reservations.length === 0 ? (
        <p className="mt-3 rounded-ticket border-2 border-dashed border-rule px-5 py-5 text-center text-soft">
          Nothing is reserved: others may take what this plan counts on.
        </p>
      ) : (
        <>
          <ul className="mt-3 grid gap-2">
            {reservations.map((one) => (
              <li
                key={one.id}
                className="flex flex-wrap items-center justify-between gap-x-4 rounded-ticket border border-rule bg-card px-4 py-2"
              >
                <div className="min-w-0">
                  <Link
                    href={`/stock/lots/${one.lotNumber}`}
                    className="link inline-flex min-h-11 items-center font-bold"
                  >
                    Lot {one.lotNumber}
                  </Link>
                  <span className="ml-2 text-sm text-soft">
                    {colourName(page, one.colourCode)}
                    {one.place ? `, ${one.place}` : ""}
                  </span>
                </div>
                <div className="flex items-center gap-3">
                  <span className="text-right font-mono font-bold tracking-tighter">
                    {formatKg(one.grams)} kg
                    {one.shortGrams > 0 ? (
                      <span className="block text-sm text-warn">
                        short {formatKg(one.shortGrams)}
                      </span>
                    ) : null}
                  </span>
                  {mayPlan ? (
                    <Button
                      variant="quiet"
                      size="small"
                      busy={release.pending}
                      onClick={() => void giveBack(one.id)}
                      aria-label={`Give lot ${one.lotNumber} back`}
                    >
                      Give back
                    </Button>
                  ) : null}
                </div>
              </li>
            ))}
          </ul>
          <div className="mt-2 flex flex-wrap items-center gap-x-4 text-sm text-soft">
            {lapses === undefined ? null : (
              <span>
                Lapses on {formatDay(dayOf(lapses, timeZone))}, with a mail the day before.
              </span>
            )}
            {mayPlan ? (
              <>
                <button
                  type="button"
                  onClick={() =>
                    void prolong.send({ runId: run.id }).then(({ kind }) => {
                      if (kind === "done") router.refresh();
                    })
                  }
                  className="link inline-flex min-h-11 items-center font-bold"
                >
                  Prolong
                </button>
                <button
                  type="button"
                  onClick={() => void giveBack()}
                  className="link inline-flex min-h-11 items-center font-bold"
                >
                  Give all back
                </button>
              </>
            ) : null}
          </div>
        </>
      )}
      {mayPlan && lacks > 0 ? <PickLots page={page} onReserve={send} command={reserve} /> : null}
    </section>
  );
}

type Reservation = RunPage["reservations"][number];

const colourName = (page: RunPage, code: string): string =>
  page.run.colours.find(({ colourCode }) => colourCode === code)?.name ?? code;

function Promised({ done, page }: { done: Reserved; page: RunPage }) {
  return (
    <Notice
      tone={done.uncovered.length > 0 ? "warn" : "ok"}
      title={`${formatKg(done.grams)} kg reserved`}
      live="status"
    >
      {done.uncovered.length > 0
        ? `Nothing more was free: ${done.uncovered
            .map(
              ({ colourCode, grams }) =>
                `${colourName(page, colourCode).toLowerCase()} lacks ${formatKg(grams)} kg`,
            )
            .join(", ")}.`
        : `From ${done.picks.map(({ number }) => `lot ${number}`).join(", ")}.`}
    </Notice>
  );
}
