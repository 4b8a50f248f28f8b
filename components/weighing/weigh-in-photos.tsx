"use client";

import { useMemo } from "react";
import { formatCode } from "@/lib/core/bag-code";
import { dayOf, type Instant } from "@/lib/core/time";
import { PhotoCapture } from "../uploads/photo-capture";

type Props = {
  id: string;
  helperId: string;
  timeZone: string;
  code: string;
  netGrams: number;
  occurredAt: Instant;
  mayRemove: boolean;
};

/** Photos of one saved weigh-in; more can be added. */
export function WeighInPhotos({
  id,
  helperId,
  timeZone,
  code,
  netGrams,
  occurredAt,
  mayRemove,
}: Props) {
  const subject = useMemo(() => ({ kind: "weigh-in" as const, id }), [id]);
  return (
    <PhotoCapture
      label="Photos of this weigh-in"
      heading={<h2 className="mb-2 text-lg">Photos</h2>}
      subject={subject}
      helperId={helperId}
      facts={{
        what: `Bag ${formatCode(code)}`,
        grams: netGrams,
        day: dayOf(occurredAt, timeZone),
        timeZone,
      }}
      started
      mayRemove={mayRemove}
    />
  );
}
