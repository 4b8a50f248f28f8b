"use client";

import { useEffect, useSyncExternalStore } from "react";
import { EMPTY_PHOTO_VIEW, type PhotoQueueView } from "@/lib/offline/photo-queue";
import { photoBox, startPhotoBox } from "./shared-photo-box";

const nothing = () => EMPTY_PHOTO_VIEW;
const subscribe = (listener: () => void) => photoBox().subscribe(listener);
const view = () => photoBox().view();

/**
 * The photos that wait on this device, and keeps them being sent while the page is open.
 *
 * @param helperId whose session this is, where the page knows it: then they show without asking for it
 */
export function useQueuedPhotos(helperId: string | null): PhotoQueueView {
  useEffect(() => {
    const box = startPhotoBox();
    if (helperId !== null) void box.setHelper(helperId);
  }, [helperId]);
  return useSyncExternalStore(subscribe, view, nothing);
}
