/**
 * Sentences about a picture that did not arrive. They stand apart from the catalogue (messages.ts, which has
 * them too), because a page that takes pictures says most of them by itself.
 */
import { text, type Sentence } from "./capture-messages";
import type { ErrorCode, ErrorDetail } from "./errors";

export const PHOTO_SENTENCES = {
  "photo-not-a-picture": () =>
    "This file is not a picture that can be read. It was not kept; take a JPEG, PNG or WebP.",
  "photo-heic": () =>
    "This picture is in the HEIC form, which cannot be read here. It was not kept; set the phone's camera to “Most compatible”, or share the picture as JPEG.",
  "photo-too-large": () =>
    "This picture is too large: at most 8 MB and 50 million pixels go. It was not kept; send it smaller.",
  "photo-empty": () => "This file is empty. Nothing was kept; take the picture again.",
  "photos-too-many": (v) =>
    `There is room for ${text(v.most)} pictures here. This one was not kept; remove another first.`,
  "photo-subject-unknown": () =>
    "What this picture was for is not there. It was not kept; reload the page and add it again.",
  "photo-link-expired": () =>
    "Sending took so long that the storage no longer took the picture. It was not kept; try again.",
  "photo-link-refused": () =>
    "The storage did not accept this picture, because its address was changed on the way. It was not kept; try again.",
  "photo-link-used": () =>
    "The storage had this picture's place in use already. It was not kept; try again.",
  "photo-cut-off": () =>
    "The connection broke before the picture was through. Nothing of it was kept; try again.",
  "photo-cancelled": () => "Cancelled. Nothing of this picture was kept.",
  "photo-unfinished": () =>
    "The picture arrived but could not be finished. It was not kept; try again.",
  "photo-storage-down": () =>
    "The picture storage does not answer. Everything else works; try the picture again in a while.",
} as const satisfies Partial<Record<ErrorCode, Sentence>>;

export type PhotoCode = keyof typeof PHOTO_SENTENCES;

/** Is it one of the codes that have their sentence here? */
export function isPhotoCode(code: string): code is PhotoCode {
  return Object.hasOwn(PHOTO_SENTENCES, code);
}

/** The sentence for one of these codes with its values. */
export function photoSentence(code: PhotoCode, values: ErrorDetail = {}): string {
  const say: Sentence = PHOTO_SENTENCES[code];
  return say(values);
}
