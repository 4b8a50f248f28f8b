/**
 * Photos that wait on this device. Invariant: a picture leaves only when the server acknowledged it, or by a
 * person's hand; it goes in the session of whoever took it, and to the subject that it was taken for.
 *
 * Plain data in, plain data out; the store and the sender are elsewhere.
 */
import type { Lab } from "@/lib/core/colour";
import type { ErrorDetail } from "@/lib/core/errors";
import type { Photo } from "@/lib/uploads/contract";
import type { PhotoPurpose, PhotoSubject } from "@/lib/uploads/terms";

/** Sendings at the same time. */
export const MOST_AT_ONCE = 3;

export type PhotoItemState =
  /** Is sent at the next occasion that is due. */
  | "waiting"
  /** On its way; after a reload it counts as waiting, because the same photo id is safe to send twice. */
  | "sending"
  /** Cancelled by hand; sent again only by hand. */
  | "stopped"
  /** The server said no: a person has to look. */
  | "refused";

/** Why a sending did not end well, as a code with its values. */
export type PhotoTrouble = { code: string; values: ErrorDetail };

export type PhotoItem = {
  /** UUIDv7, the photo's id for good: a second try is the same photo. */
  photoId: string;
  subjectKind: PhotoSubject;
  subjectId: string;
  purpose: PhotoPurpose;
  /** Opaque id of the person in whose session it was taken, the only session that may send it. */
  helper: string;
  /** Epoch milliseconds of this device. */
  madeAt: number;
  /** JPEG, scaled, without what the camera wrote beside the picture. */
  blob: Blob;
  /** Pixels of it. */
  width: number;
  height: number;
  /** Colour of its middle; null when it shows none. */
  middle: Lab | null;
  state: PhotoItemState;
  /** Sendings that began since a person last pressed "try again". */
  tries: number;
  /** Epoch milliseconds before which it is not tried again by itself. */
  dueAt: number;
  trouble: PhotoTrouble | null;
};

export type NewPhoto = Omit<PhotoItem, "state" | "tries" | "dueAt" | "trouble">;

/** How one sending ended. */
export type PhotoOutcome =
  | { kind: "sent"; photo: Photo }
  /** It may well go through later: no storage, a broken connection. */
  | { kind: "later"; trouble: PhotoTrouble }
  | { kind: "refused"; trouble: PhotoTrouble }
  | { kind: "cancelled" }
  /** There is no point in trying the others now: no answer of the program, or not this helper's session. */
  | { kind: "stop"; trouble: PhotoTrouble };

const FIRST_PAUSE_MS = 10_000;
const LONGEST_PAUSE_MS = 120_000;

export function newPhotoItem(photo: NewPhoto): PhotoItem {
  return { ...photo, state: "waiting", tries: 0, dueAt: 0, trouble: null };
}

export function markPhotoSending(item: PhotoItem): PhotoItem {
  return { ...item, state: "sending", tries: item.tries + 1, trouble: null };
}

/** A person wants it sent now. */
export function markPhotoRetried(item: PhotoItem): PhotoItem {
  return { ...item, state: "waiting", tries: 0, dueAt: 0, trouble: null };
}

export function markPhotoStopped(item: PhotoItem): PhotoItem {
  return { ...item, state: "stopped", trouble: null };
}

/** The item after a sending; null when it is acknowledged and its picture may go from this device. */
export function afterPhotoSending(
  item: PhotoItem,
  outcome: PhotoOutcome,
  now: number,
): PhotoItem | null {
  switch (outcome.kind) {
    case "sent":
      return null;
    case "refused":
      return { ...item, state: "refused", trouble: outcome.trouble };
    case "cancelled":
      return markPhotoStopped(item);
    case "stop":
      // Not the picture's fault, so it does not have to wait longer each time.
      return { ...item, state: "waiting", dueAt: 0, trouble: outcome.trouble };
    case "later": {
      const pause = Math.min(FIRST_PAUSE_MS * 2 ** Math.max(0, item.tries - 1), LONGEST_PAUSE_MS);
      return { ...item, state: "waiting", dueAt: now + pause, trouble: outcome.trouble };
    }
  }
}

const oldestFirst = (one: PhotoItem, other: PhotoItem): number =>
  one.madeAt - other.madeAt || (one.photoId < other.photoId ? -1 : 1);

/**
 * What may be sent now, oldest first: only this helper's, and nothing that a person has to look at.
 *
 * @param now epoch milliseconds; null to send what is not due yet as well
 */
export function photosToSend(
  items: readonly PhotoItem[],
  helper: string,
  now: number | null,
): PhotoItem[] {
  return items
    .filter(
      (item) =>
        item.helper === helper &&
        (item.state === "waiting" || item.state === "sending") &&
        (now === null || item.dueAt <= now),
    )
    .sort(oldestFirst);
}

export type PhotoQueueView = {
  /** This helper's, oldest first. */
  mine: readonly PhotoItem[];
  /** Per cent by photo id, of those on their way; at 100 the server still works on it. */
  progress: ReadonlyMap<string, number>;
  waiting: number;
  /** Stopped and refused ones. */
  toLookAt: number;
  /** Pictures of other helpers of this device: only their number is shown. */
  others: number;
};

export const EMPTY_PHOTO_VIEW: PhotoQueueView = {
  mine: [],
  progress: new Map(),
  waiting: 0,
  toLookAt: 0,
  others: 0,
};

export function photoViewFor(
  items: readonly PhotoItem[],
  helper: string | null,
  progress: ReadonlyMap<string, number>,
): PhotoQueueView {
  const mine = items.filter((item) => item.helper === helper).sort(oldestFirst);
  const toLookAt = mine.filter(({ state }) => state === "stopped" || state === "refused").length;
  return {
    mine,
    progress: new Map(progress),
    waiting: mine.length - toLookAt,
    toLookAt,
    others: items.length - mine.length,
  };
}
