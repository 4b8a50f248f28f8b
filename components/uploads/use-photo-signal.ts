"use client";

import { useEffect, useSyncExternalStore } from "react";
import { NO_PHOTOS, onPhotoSignal, photoSignal, photosWereLeft } from "./photo-signal";

const none = () => NO_PHOTOS;

/** How many photos wait; takes up those that an earlier page left. */
export function usePhotoSignal() {
  useEffect(() => {
    if (!photosWereLeft()) return;
    // Not fetched without signal: the next page, or the first new photo, does it.
    void import("./shared-photo-box").then(
      ({ startPhotoBox }) => startPhotoBox(),
      () => undefined,
    );
  }, []);
  return useSyncExternalStore(onPhotoSignal, photoSignal, none);
}
