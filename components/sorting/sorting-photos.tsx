"use client";

import { useMemo } from "react";
import { PhotoCapture } from "../uploads/photo-capture";

type Props = {
  /** Of the session, or of the draft that becomes it: it is the same. */
  id: string;
  helperId: string;
  timeZone: string;
  what: string;
  grams: number | null;
  mayRemove?: boolean;
};

/** Photos of what lay on the table. */
export function SortingPhotos({ id, helperId, timeZone, what, grams, mayRemove = false }: Props) {
  const subject = useMemo(() => ({ kind: "sorting" as const, id }), [id]);
  return (
    <PhotoCapture
      label="Photos of the table"
      heading={<h2 className="mb-1.5 font-body text-sm font-bold text-soft">Photos</h2>}
      subject={subject}
      helperId={helperId}
      facts={{ what, grams, day: null, timeZone }}
      started
      mayRemove={mayRemove}
    />
  );
}
