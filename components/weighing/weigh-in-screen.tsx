"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { onReceipt, sendAs } from "@/components/forms/outbox";
import { QueryProvider } from "@/components/forms/query-provider";
import { ProblemError, UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { Late } from "@/components/ui/late";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import { usePhotoSignal } from "../uploads/use-photo-signal";
import { TodayTickets } from "./today-tickets";
import { useDeskLists } from "./use-desk-lists";
import { useToday } from "./use-today";
import { useWeighIn } from "./use-weigh-in";
import { WaitingTickets } from "./waiting-tickets";
import { WeighInFields } from "./weigh-in-fields";

const loadWaitingPhotos = async () => (await import("../uploads/waiting-photos")).WaitingPhotos;

/** Tickets shown under the form; the day's page has them all. */
const SHOWN = 12;

/** Weigh-in: scan, read the scale, save, next bag. Its HTML holds no person's data. */
export function WeighInScreen() {
  return (
    <QueryProvider>
      <Desk />
    </QueryProvider>
  );
}

function Desk() {
  const queries = useQueryClient();
  const lists = useDeskLists();
  const { data: today } = useToday(SHOWN);
  const zone = today?.timeZone ?? "UTC";
  const weighIn = useWeighIn(lists, today?.helperId ?? null);
  const photos = usePhotoSignal();
  const [cameraOn, setCameraOn] = useState(false);
  const helperId = today?.helperId;
  useEffect(() => {
    if (!helperId) return;
    sendAs(helperId);
    // What was sent in the background belongs into the list of today.
    return onReceipt(() => void queries.invalidateQueries({ queryKey: ["weigh-ins"] }));
  }, [helperId, queries]);
  return (
    <div className="grid grow items-start gap-x-10 rail:grid-cols-[minmax(0,34rem)_minmax(0,1fr)]">
      <div className="flex min-w-0 grow flex-col">
        {lists.error && !lists.ready ? (
          <Notice tone="bad" title="No lists" live="alert" className="mb-3">
            {lists.error instanceof ProblemError
              ? lists.error.problem.detail
              : UNREACHABLE_SENTENCE}
          </Notice>
        ) : null}
        {lists.ready && lists.scales.length === 0 ? (
          <Notice tone="info" title="No scale yet">
            A coordinator adds the scale under Scales: its Max, its step, its class. Then bags can
            be weighed in.
          </Notice>
        ) : lists.ready || !lists.error ? (
          lists.ready ? (
            <WeighInFields
              weighIn={weighIn}
              lists={lists}
              zone={zone}
              helperId={today?.helperId ?? null}
              bagsToday={today?.bags ?? null}
              cameraOn={cameraOn}
              onCamera={setCameraOn}
            />
          ) : (
            <Skeleton shape="tickets" count={3} label="Loading the weigh-in" />
          )
        ) : null}
      </div>
      <div className="min-w-0">
        <WaitingTickets zone={zone} onEdit={weighIn.touched ? null : weighIn.edit} />
        <Late
          load={loadWaitingPhotos}
          given={
            photos.waiting + photos.toLookAt > 0
              ? { zone, helperId: helperId ?? null, exceptSubject: weighIn.form.values.id }
              : null
          }
        />
        <TodayTickets limit={SHOWN} heading="Today" />
      </div>
    </div>
  );
}
