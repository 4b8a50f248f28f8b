/**
 * Invariant: a picture is taken only for something that is there or about to be, never beyond the number that
 * one subject holds, and a chip only of a lot. The same checks run before a file is sent and after it arrived.
 */
import type { ErrorCode } from "@/lib/core/errors";
import { isUuidV7 } from "@/lib/core/ids";
import {
  MOST_PHOTO_BYTES,
  MOST_PHOTOS,
  PHOTO_TYPES,
  type PhotoPurpose,
  type PhotoSubject,
} from "../terms";

/** A weigh-in's id is made by the phone, so its pictures may come before it. */
const MAY_COME_LATER: Readonly<Record<PhotoSubject, boolean>> = {
  "weigh-in": true,
  lot: false,
  sorting: true,
  step: true,
  count: true,
  removal: true,
};

/**
 * May a picture be added to a subject?
 *
 * @param others live pictures of it besides this one
 * @returns the code of the refusal, or null
 */
export function refuseSubject(asked: {
  kind: PhotoSubject;
  id: string;
  exists: boolean;
  purpose: PhotoPurpose;
  others: number;
}): ErrorCode | null {
  if (asked.purpose === "chip" && asked.kind !== "lot") return "photo-subject-unknown";
  if (!asked.exists && !(MAY_COME_LATER[asked.kind] && isUuidV7(asked.id))) {
    return "photo-subject-unknown";
  }
  return asked.others >= MOST_PHOTOS ? "photos-too-many" : null;
}

/**
 * May a file of this declared type and size be sent at all? Its content is looked at when it has arrived.
 *
 * @param size bytes
 */
export function refuseFile(file: { type: string; size: number }): ErrorCode | null {
  if (!Number.isSafeInteger(file.size) || file.size <= 0) return "photo-empty";
  if (file.size > MOST_PHOTO_BYTES) return "photo-too-large";
  const types: readonly string[] = PHOTO_TYPES;
  if (types.includes(file.type)) return null;
  return /^image\/hei[cf]/.test(file.type) ? "photo-heic" : "photo-not-a-picture";
}
