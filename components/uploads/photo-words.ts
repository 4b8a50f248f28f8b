/** What is said of a picture that did not arrive, in the words of where it is now. */
import { isPhotoCode, photoSentence } from "@/lib/core/photo-messages";
import type { PhotoItem, PhotoTrouble } from "@/lib/offline/photo-queue";
import { MOST_PHOTOS } from "@/lib/uploads/terms";

const KEPT = "It is kept on this phone and sent by itself.";

/** While it waits nobody has to do anything, and nothing is lost. */
const WAITING: Readonly<Record<string, string>> = {
  "photo-storage-down": `The picture storage does not answer. ${KEPT}`,
  "photo-cut-off": `The connection broke. ${KEPT}`,
  unreachable: `The server does not answer. ${KEPT}`,
  "signed-out": "It is kept on this phone until you sign in again.",
  "session-ended": "It is kept on this phone until you sign in again.",
};

/** Refusals of the server that are not only a picture's. */
const REFUSED: Readonly<Record<string, string>> = {
  "not-found": "This picture was removed meanwhile. Delete it here too.",
  forbidden: "Your role does not include adding pictures. It was not sent.",
};

/** The sentence for a picture the server did not take. */
export function refusalWords({ code, values }: PhotoTrouble): string {
  // The completion of an upload tells its code alone.
  if (isPhotoCode(code)) return photoSentence(code, { most: MOST_PHOTOS, ...values });
  return (
    REFUSED[code] ??
    "The program did not take this picture. Delete it and take it again; if that fails too, tell whoever runs the program."
  );
}

/** What stands beside a picture that is not on the server yet. */
export function photoStateWords(item: PhotoItem, percent: number | undefined): string {
  switch (item.state) {
    case "sending":
      if (percent === undefined) return "About to be sent";
      return percent >= 100 ? "Sent, being checked" : `${percent} % sent`;
    case "stopped":
      return "Cancelled. It is still on this phone.";
    case "refused":
      return item.trouble ? refusalWords(item.trouble) : "Not taken.";
    case "waiting":
      return item.trouble
        ? (WAITING[item.trouble.code] ?? `That did not work yet. ${KEPT}`)
        : "Waiting to be sent";
  }
}

/** "2 photos being sent" */
export function sendingWords(waiting: number): string {
  return waiting === 1 ? "1 photo being sent" : `${waiting} photos being sent`;
}
