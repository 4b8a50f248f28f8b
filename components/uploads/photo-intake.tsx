"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useRef, useState } from "react";
import { Notice } from "@/components/ui/notice";
import type { Lab } from "@/lib/core/colour";
import type { PhotoPurpose } from "@/lib/uploads/terms";
import { addPhotos, type Added } from "./add-photos";
import type { PhotoFacts } from "./photo-alt";
import { photosKey, type PhotoSubjectRef } from "./photo-subject";
import { PhotoTray } from "./photo-tray";
import { usePaste } from "./use-paste";

/** Files chosen at once. */
export type PhotoBatch = {
  files: readonly File[];
  purpose: PhotoPurpose;
  /** In whose session they were chosen: another helper may have signed in before they are read. */
  helperId: string;
};

export type IntakeProps = {
  subject: PhotoSubjectRef;
  /** Whose session this is; null while that is not known, and then nothing can be added. */
  helperId: string | null;
  facts: PhotoFacts;
  /** The last files chosen; each object is taken once. */
  batch: PhotoBatch | null;
  /** Colour of the middle of the picture just added. */
  onMiddle?: (middle: Lab | null) => void;
  mayRemove?: boolean;
  /** Takes what is pasted on the page; of several on one page, one does. */
  paste?: boolean;
};

/** What becomes of chosen files: read, scaled, queued; and all photos of the subject. */
export function PhotoIntake({
  subject,
  helperId,
  facts,
  batch,
  onMiddle,
  mayRemove = false,
  paste = true,
}: IntakeProps) {
  const queries = useQueryClient();
  const [reading, setReading] = useState(0);
  const [said, setSaid] = useState<Added | null>(null);
  const taken = useRef<PhotoBatch | null>(null);

  const add = useCallback(
    async ({ files, purpose, helperId }: PhotoBatch) => {
      setSaid(null);
      setReading((count) => count + files.length);
      try {
        const already = () => {
          const known = queries.getQueryData<{ photos: { id: string }[] }>(photosKey(subject));
          return new Set(known?.photos.map(({ id }) => id));
        };
        const added = await addPhotos({ files, subject, purpose, helperId, already });
        if (added.notTaken.length > 0 || !added.kept) setSaid(added);
        if (added.added > 0) onMiddle?.(added.middle);
      } finally {
        setReading((count) => count - files.length);
      }
    },
    [onMiddle, queries, subject],
  );
  useEffect(() => {
    if (batch === null || taken.current === batch) return;
    taken.current = batch;
    void add(batch);
  }, [add, batch]);
  usePaste(
    useCallback(
      (files: File[]) => {
        if (helperId !== null) void add({ files, purpose: "view", helperId });
      },
      [add, helperId],
    ),
    paste && helperId !== null,
  );

  return (
    <>
      <p role="status" className="mt-1 text-sm text-soft empty:hidden">
        {reading > 0 ? `Reading ${reading === 1 ? "the picture" : `${reading} pictures`}` : ""}
      </p>
      {said ? <Said said={said} /> : null}
      <PhotoTray subject={subject} helperId={helperId} facts={facts} mayRemove={mayRemove} />
    </>
  );
}

function Said({ said: { notTaken, kept } }: { said: Added }) {
  return (
    <div className="mt-2 grid gap-2">
      {notTaken.length > 0 ? (
        <Notice
          tone="bad"
          title={notTaken.length === 1 ? "Not taken" : `${notTaken.length} not taken`}
          live="alert"
        >
          <ul className="grid gap-1.5">
            {notTaken.map(({ name, sentence }, at) => (
              <li key={at}>
                <span className="font-bold break-all">{name}</span>: {sentence}
              </li>
            ))}
          </ul>
        </Notice>
      ) : null}
      {kept ? null : (
        <Notice tone="warn" title="Leave this page open" live="status">
          This phone has no room to keep pictures. They are lost if the page is closed before they
          are sent.
        </Notice>
      )}
    </div>
  );
}
