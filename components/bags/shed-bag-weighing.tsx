"use client";

import Link from "next/link";
import { useMemo } from "react";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg } from "@/lib/core/mass";
import { dayOf } from "@/lib/core/time";
import type { BagWeighIn } from "@/lib/weighing/queries/weigh-ins";
import { whenWords } from "@/lib/weighing/rules";
import { CONDITION_NAMES } from "@/lib/weighing/terms";
import { likelyWhat } from "../uploads/photo-alt";
import { PhotoCapture } from "../uploads/photo-capture";

type Props = {
  weighIn: BagWeighIn;
  /** Its place among the bag's weighings, from 1. */
  at: number;
  of: number;
  timeZone: string;
  helperId: string;
  mayRemovePhotos: boolean;
};

const STATE_WORDS: Record<BagWeighIn["state"], string> = {
  posted: "Weighed in",
  "for-review": "Second reading, kept for review",
  undone: "Weighed in, undone",
  discarded: "Second reading, undone",
  corrected: "Weighed in, corrected since",
};

/** One weighing of a bag, with the photos that were taken for it. */
export function ShedBagWeighing({ weighIn, at, of, timeZone, helperId, mayRemovePhotos }: Props) {
  const { id, state, netGrams, occurredAt, condition, polymer, colourName, byName } = weighIn;
  const subject = useMemo(() => ({ kind: "weigh-in" as const, id }), [id]);
  const what = likelyWhat(polymer, colourName);
  const counts = state === "posted";
  return (
    <Ticket
      as="section"
      label={of > 1 ? `Weighing ${at} of ${of}` : "Weighing"}
      stub={
        <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
          <div className="min-w-40 grow basis-40">
            <WeightDisplay
              label="Net"
              value={formatKg(netGrams)}
              tone={counts ? "ok" : "soft"}
              largest={44}
            />
          </div>
          <p className="min-w-0 text-sm">
            <strong className="block">{STATE_WORDS[state]}</strong>
            <span className="text-soft">
              {whenWords(occurredAt, timeZone)}, {byName}
            </span>
            <span className="block text-soft">
              {what}, {CONDITION_NAMES[condition].toLowerCase()}
            </span>
            <Link
              href={`/weigh-ins/${id}`}
              className="link -mb-2 inline-flex min-h-11 items-center font-bold"
            >
              See the ticket
            </Link>
          </p>
        </div>
      }
    >
      <PhotoCapture
        heading={<h2 className="mb-2 text-lg">Photos</h2>}
        label={of > 1 ? `Photos of weighing ${at}` : "Photos of this bag"}
        subject={subject}
        helperId={helperId}
        facts={{ what, grams: netGrams, day: dayOf(occurredAt, timeZone), timeZone }}
        started
        mayRemove={mayRemovePhotos}
        paste={at === of}
      />
    </Ticket>
  );
}
