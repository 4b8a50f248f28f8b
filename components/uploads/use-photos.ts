"use client";

import { useQuery, useQueryClient, type QueryClient } from "@tanstack/react-query";
import { useEffect } from "react";
import { fetchEndpoint, type AddressOf, type OutputOf } from "@/components/forms/fetch-endpoint";
import type { listPhotosEndpoint, Photo } from "@/lib/uploads/contract";
import { photosKey, type PhotoSubjectRef } from "./photo-subject";
import { photoBox } from "./shared-photo-box";

const LIST: AddressOf<typeof listPhotosEndpoint> = { method: "GET", path: "/api/photos" };
type Listed = OutputOf<typeof listPhotosEndpoint>;

/** Puts an acknowledged photo into what is shown, so that it does not vanish between queue and list. */
function show(queries: QueryClient, subject: PhotoSubjectRef, photo: Photo): void {
  queries.setQueryData<Listed>(photosKey(subject), (known) => ({
    photos: [
      // A new chip photo takes the place of the earlier one, which stays as a photo.
      ...(known?.photos ?? [])
        .filter(({ id }) => id !== photo.id)
        .map((other) =>
          photo.purpose === "chip" && other.purpose === "chip"
            ? { ...other, purpose: "view" as const }
            : other,
        ),
      photo,
    ],
  }));
}

/** The photos of a subject that the server has, oldest first. */
export function usePhotos(subject: PhotoSubjectRef) {
  const queries = useQueryClient();
  const { kind, id } = subject;
  useEffect(
    () =>
      photoBox().onSent((item, photo) => {
        if (item.subjectId !== id) return;
        show(queries, { kind, id }, photo);
        void queries.invalidateQueries({ queryKey: photosKey({ kind, id }) });
      }),
    [queries, kind, id],
  );
  return useQuery({
    queryKey: photosKey(subject),
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof listPhotosEndpoint>(LIST, { subjectKind: kind, subjectId: id }, signal),
  });
}
