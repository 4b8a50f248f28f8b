/** Closed lists of photos. */

/** What a photo can belong to. A later step adds its own; `lib/uploads/queries/subjects.ts` says how each is found. */
export const PHOTO_SUBJECTS = ["weigh-in", "lot", "sorting", "step", "count", "removal"] as const;
export type PhotoSubject = (typeof PHOTO_SUBJECTS)[number];

/** A chip photo shows a lot's flake or a moulded chip by itself, and its colour is measured; a lot has one at most. */
export const PHOTO_PURPOSES = ["view", "chip"] as const;
export type PhotoPurpose = (typeof PHOTO_PURPOSES)[number];

/** Who may see it: the shed's people, the host of the point too, anybody. */
export const PHOTO_VISIBILITIES = ["shed", "host", "public"] as const;

export const PHOTO_SIZES = ["large", "thumb"] as const;

/** Longer edge of what is kept, in px; the client scales to it before sending. */
export const LARGE_EDGE_PIXELS = 1600;
export const THUMB_EDGE_PIXELS = 320;
/** Live photos of one subject. */
export const MOST_PHOTOS = 12;
/** Bytes of one file as it is sent. */
export const MOST_PHOTO_BYTES = 8 * 1024 * 1024;
/** Width times height of what the server will decode. */
export const MOST_PHOTO_PIXELS = 50_000_000;
/** What is taken, by content. */
export const PHOTO_TYPES = ["image/jpeg", "image/png", "image/webp"] as const;
/** After so long a photo that nothing refers to is cleaned up. */
export const UNREFERRED_MILLISECONDS = 24 * 60 * 60 * 1000;
/** The name under which the storage's protocol knows our one way to send. */
export const PHOTO_ROUTE = "photo";
