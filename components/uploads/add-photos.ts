/** From chosen files to the queue: one after the other, because two large pictures at once fill a cheap phone. */
import { keepStorage } from "@/components/forms/outbox";
import type { Lab } from "@/lib/core/colour";
import { newId } from "@/lib/core/ids";
import { photoSentence } from "@/lib/core/photo-messages";
import type { PhotoPurpose } from "@/lib/uploads/terms";
import { MOST_PHOTOS } from "@/lib/uploads/terms";
import type { PhotoSubjectRef } from "./photo-subject";
import { preparePhoto } from "./prepare-photo";
import { startPhotoBox } from "./shared-photo-box";

/** A file that was not taken, with our own sentence. */
export type NotTaken = { name: string; sentence: string };

export type Added = {
  notTaken: NotTaken[];
  /** Colour of the middle of the last one that shows any. */
  middle: Lab | null;
  added: number;
  /** False: this phone cannot keep pictures, so that the page must stay open until they are sent. */
  kept: boolean;
};

export type Adding = {
  files: readonly File[];
  subject: PhotoSubjectRef;
  purpose: PhotoPurpose;
  /** Whose session this is. */
  helperId: string;
  /** Ids of the subject's photos that the server has by now, as far as known; they grow while others are read. */
  already: () => ReadonlySet<string>;
};

/** Prepares and queues pictures; they are sent by themselves from then on. */
export async function addPhotos({
  files,
  subject,
  purpose,
  helperId,
  already,
}: Adding): Promise<Added> {
  const box = startPhotoBox();
  await box.setHelper(helperId);
  const result: Added = { notTaken: [], middle: null, added: 0, kept: true };
  for (const file of files) {
    const refuse = (sentence: string) => result.notTaken.push({ name: file.name, sentence });
    const taken = new Set(already());
    // One that was just acknowledged may stand in both.
    for (const { subjectId, photoId } of box.view().mine) {
      if (subjectId === subject.id) taken.add(photoId);
    }
    if (taken.size >= MOST_PHOTOS) {
      refuse(photoSentence("photos-too-many", { most: MOST_PHOTOS }));
      continue;
    }
    const prepared = await preparePhoto(file);
    if (!prepared.ok) {
      refuse(photoSentence(prepared.code));
      continue;
    }
    const { middle, ...picture } = prepared.photo;
    const kept = await box.add([
      {
        photoId: newId<"photo">(),
        subjectKind: subject.kind,
        subjectId: subject.id,
        purpose,
        helper: helperId,
        madeAt: Date.now(),
        middle,
        ...picture,
      },
    ]);
    result.added += 1;
    result.kept &&= kept;
    result.middle = middle ?? result.middle;
  }
  if (result.added > 0) void keepStorage();
  return result;
}
