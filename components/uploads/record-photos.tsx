"use client";

import { useMemo } from "react";
import type { PhotoFacts } from "./photo-alt";
import { PhotoCapture } from "./photo-capture";
import type { PhotoSubjectRef } from "./photo-subject";

type Props = PhotoSubjectRef & {
  /** Accessible name of the part. */
  label: string;
  facts: PhotoFacts;
  helperId: string;
  mayRemove: boolean;
};

/** Photos on the page of a saved record; more can be added. */
export function RecordPhotos({ kind, id, label, facts, helperId, mayRemove }: Props) {
  const subject = useMemo(() => ({ kind, id }), [kind, id]);
  return (
    <PhotoCapture
      label={label}
      heading={<h2 className="mb-2 text-lg">Photos</h2>}
      subject={subject}
      helperId={helperId}
      facts={facts}
      started
      mayRemove={mayRemove}
    />
  );
}
