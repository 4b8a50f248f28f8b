/** The one place where the storage's own kit is used in the browser; it travels with the first picture sent. */
import { generateReactHelpers } from "@uploadthing/react";
import type { FileRoute } from "uploadthing/types";
import type * as z from "zod";
import type { ProblemDocument } from "@/lib/core/errors";
import type { PhotoItem, PhotoOutcome } from "@/lib/offline/photo-queue";
import type { Photo, photoInputSchema, uploadedSchema } from "@/lib/uploads/contract";
import { completionFailure, mayRetry, uploadFailure } from "@/lib/uploads/rules/failure";
import { PHOTO_ROUTE } from "@/lib/uploads/terms";

type PhotoInput = z.input<typeof photoInputSchema>;
type Uploaded = z.output<typeof uploadedSchema>;
type PhotoRouter = {
  [PHOTO_ROUTE]: FileRoute<{ input: PhotoInput; output: Uploaded; errorShape: ProblemDocument }>;
};

const { uploadFiles } = generateReactHelpers<PhotoRouter>({ url: "/api/uploadthing" });

/** Refusals that the picture is not to blame for. */
const NOT_THIS_SESSION: ReadonlySet<string> = new Set(["signed-out", "session-ended"]);

function outcomeOf({ code, values }: ReturnType<typeof uploadFailure>): PhotoOutcome {
  const trouble = { code, values };
  if (code === "photo-cancelled") return { kind: "cancelled" };
  if (NOT_THIS_SESSION.has(code)) return { kind: "stop", trouble };
  return mayRetry(code) ? { kind: "later", trouble } : { kind: "refused", trouble };
}

/** @returns how it ended; what the kit throws never leaves this function */
export async function sendPhoto(
  item: PhotoItem,
  watch: { signal: AbortSignal; onProgress: (percent: number) => void },
): Promise<PhotoOutcome> {
  const { photoId, subjectKind, subjectId, purpose, blob } = item;
  // The file's own name is not needed, and may name a person.
  const file = new File([blob], "photo.jpg", { type: "image/jpeg", lastModified: item.madeAt });
  try {
    const [sent] = await uploadFiles(PHOTO_ROUTE, {
      files: [file],
      input: { photoId, subjectKind, subjectId, purpose },
      signal: watch.signal,
      onUploadProgress: ({ progress }) =>
        watch.onProgress(Math.min(100, Math.max(0, Math.round(progress)))),
    });
    const answer = sent?.serverData;
    if (answer?.ok) return { kind: "sent", photo: answer.photo satisfies Photo };
    return outcomeOf(completionFailure(answer ? answer.reason : ""));
  } catch (error) {
    return outcomeOf(uploadFailure(error));
  }
}
