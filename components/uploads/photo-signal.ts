/**
 * How many photos wait, for the indicator on every page: it must not load the queue of photos to say that
 * there are none.
 */

export type PhotoSignal = { waiting: number; toLookAt: number };

export const NO_PHOTOS: PhotoSignal = { waiting: 0, toLookAt: 0 };

const FLAG = "bismar-photos-wait";
const listeners = new Set<() => void>();
let shown: PhotoSignal = NO_PHOTOS;

export const photoSignal = (): PhotoSignal => shown;

export function onPhotoSignal(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

/** @param others pictures of other helpers, which wait for them on this device */
export function signalPhotos(next: PhotoSignal, others: number): void {
  try {
    if (next.waiting + next.toLookAt + others > 0) localStorage.setItem(FLAG, "1");
    else localStorage.removeItem(FLAG);
  } catch {
    // Without storage nothing outlives the page, so there is nothing to remember.
  }
  if (next.waiting === shown.waiting && next.toLookAt === shown.toLookAt) return;
  shown = next;
  for (const listener of listeners) listener();
}

/** Did an earlier page leave photos on this device? */
export function photosWereLeft(): boolean {
  try {
    return localStorage.getItem(FLAG) !== null;
  } catch {
    return false;
  }
}
