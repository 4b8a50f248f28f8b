/** Photos on their way, as the tests of queue and box make them. */
import { type NewPhoto, type PhotoItem, type PhotoOutcome } from "@/lib/offline/photo-queue";

export const made = (number: number, more: Partial<NewPhoto> = {}): NewPhoto => ({
  photoId: `p${String(number).padStart(2, "0")}`,
  subjectKind: "weigh-in",
  subjectId: "bag-1",
  purpose: "view",
  helper: "ann",
  madeAt: 1000 + number,
  blob: new Blob([String(number)]),
  width: 4,
  height: 3,
  middle: null,
  ...more,
});
export const trouble = (code: string) => ({ code, values: {} });
export const acknowledged = (item: PhotoItem): PhotoOutcome => ({
  kind: "sent",
  photo: {
    id: item.photoId,
    purpose: item.purpose,
    width: 4,
    height: 3,
    addedAt: 1,
    addedBy: "Ann",
    lab: null,
  },
});
