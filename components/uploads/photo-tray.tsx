"use client";

import { useQueryClient } from "@tanstack/react-query";
import { ProblemError } from "@/components/forms/problem-document";
import { Button } from "@/components/ui/button";
import type { PhotoFacts } from "./photo-alt";
import { PhotoGallery } from "./photo-gallery";
import { photosKey, type PhotoSubjectRef } from "./photo-subject";
import { QueuedPhoto } from "./queued-photo";
import { usePhotos } from "./use-photos";
import { useQueuedPhotos } from "./use-queued-photos";

type Props = {
  subject: PhotoSubjectRef;
  helperId: string | null;
  facts: PhotoFacts;
  mayRemove: boolean;
};

/** The photos of a subject: those on their way, and those that the server has. */
export function PhotoTray({ subject, helperId, facts, mayRemove }: Props) {
  const queries = useQueryClient();
  const { mine, progress } = useQueuedPhotos(helperId);
  const { data, error, refetch, isFetching } = usePhotos(subject);
  const queued = mine.filter(({ subjectId }) => subjectId === subject.id);
  const photos = data?.photos ?? [];
  return (
    <div className="mt-2 grid gap-2 empty:hidden">
      {queued.length > 0 ? (
        <ul aria-label="Photos being sent" className="grid gap-2">
          {queued.map((item, at) => (
            <QueuedPhoto
              key={item.photoId}
              item={item}
              name={`Photo ${photos.length + at + 1}`}
              percent={progress.get(item.photoId)}
            />
          ))}
        </ul>
      ) : null}
      <PhotoGallery
        photos={photos}
        facts={facts}
        onRemoved={
          mayRemove
            ? (photo) => {
                const key = photosKey(subject);
                queries.setQueryData<typeof data>(key, (known) =>
                  known ? { photos: known.photos.filter(({ id }) => id !== photo.id) } : known,
                );
                void queries.invalidateQueries({ queryKey: key });
              }
            : null
        }
      />
      {error && !data ? (
        <p role="status" className="flex flex-wrap items-center gap-x-3 text-sm text-soft">
          {error instanceof ProblemError
            ? error.problem.detail
            : "The server did not answer; photos it has already are not shown."}
          <Button variant="link" size="small" busy={isFetching} onClick={() => void refetch()}>
            Try again
          </Button>
        </p>
      ) : null}
    </div>
  );
}
