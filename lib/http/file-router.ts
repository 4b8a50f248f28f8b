/**
 * What the storage's kit does for us: checks a request to send a file, signs the address, and calls back when
 * the file has arrived. Everything that it asks is decided here, and in our own codes.
 */
import "server-only";
import { randomUUID } from "node:crypto";
import {
  createRouteHandler,
  createUploadthing,
  UploadThingError,
  UTFiles,
  type FileRouter,
} from "uploadthing/server";
import * as z from "zod";
import { AppError, type ErrorCode, type ErrorDetail } from "@/lib/core/errors";
import type { PersonId } from "@/lib/core/ids";
import { findPersonRole } from "@/lib/identity/queries";
import { requirePerson, type Context } from "@/lib/platform/context";
import { settings } from "@/lib/platform/env";
import { log } from "@/lib/platform/logger";
import { storage } from "@/lib/platform/storage";
import { addPhoto, checkAdmission, ORIGINAL_NAME } from "@/lib/uploads/commands/add-photo";
import { photoInputSchema, type Uploaded } from "@/lib/uploads/contract";
import { refuseFile } from "@/lib/uploads/rules/admission";
import { MOST_PHOTOS, PHOTO_ROUTE } from "@/lib/uploads/terms";
import { anonymousContext, newRequestId } from "./request-context";

/** What the kit's error answers carry; the door makes a problem document of it. */
export type KitRefusal = { code: ErrorCode; values: ErrorDetail };

/** Contexts of requests that were let in; the kit hands the request on, and nothing else. */
const contexts = new WeakMap<Request, Context>();

/** Travels with the file through the storage and comes back signed. */
const metadataSchema = photoInputSchema.extend({
  personId: z.string() as unknown as z.ZodType<PersonId, string>,
});

/** Its own checks are only reached by what ours let through; each still has a code. */
const KIT_CODES: readonly (readonly [RegExp, ErrorCode])[] = [
  [/^Invalid input/, "invalid"],
  [/FileSizeMismatch/, "photo-too-large"],
  [/FileCountMismatch/, "photos-too-many"],
  [/FileType/, "photo-not-a-picture"],
  [/^Invalid signature/, "forbidden"],
  [/^No file route/, "not-found"],
];

function formatError(error: UploadThingError): KitRefusal {
  if (error.cause instanceof AppError) {
    return { code: error.cause.code, values: error.cause.detail };
  }
  const code = KIT_CODES.find(([pattern]) => pattern.test(error.message))?.[1] ?? "internal";
  if (code === "internal") log.error("upload-kit", error.message);
  return { code, values: code === "photos-too-many" ? { most: MOST_PHOTOS } : {} };
}

/** The kit passes its own kind of error on as it is (an Error, though its types do not say so), and hides others. */
function kitError(error: unknown, ctx: Context): Error {
  if (!(error instanceof AppError))
    log.error("request-failed", error, { requestId: ctx.requestId });
  const cause =
    error instanceof AppError ? error : new AppError("internal", { requestId: ctx.requestId });
  const own = new UploadThingError({ code: "BAD_REQUEST", message: cause.code, cause });
  return own;
}

/** The request of the storage has no session: who it acts for came back with the file. */
function completionContext(request: Request, personId: PersonId): Context {
  const ctx = anonymousContext(request.headers, newRequestId());
  const role = findPersonRole(ctx.db.reader, personId);
  if (role) ctx.actor = { kind: "person", id: personId, role, sessionId: null };
  return ctx;
}

async function complete(request: Request, metadata: unknown, fileKey: string): Promise<Uploaded> {
  try {
    const { personId, ...input } = metadataSchema.parse(metadata);
    const ctx = completionContext(request, personId);
    return { ok: true, photo: await addPhoto(ctx, storage(), { ...input, fileKey }) };
  } catch (error) {
    // A throw would leave the sender waiting for an answer that never comes.
    if (error instanceof AppError) return { ok: false, reason: error.code };
    log.error("photo-failed", error, { fileKey });
    return { ok: false, reason: "photo-unfinished" };
  }
}

const file = { maxFileSize: "8MB", maxFileCount: 1, acl: "private" } as const;
const build = createUploadthing({ errorFormatter: formatError });

const router = {
  [PHOTO_ROUTE]: build(
    { "image/jpeg": file, "image/png": file, "image/webp": file },
    {
      awaitServerData: true,
      presignedURLTTL: "5m",
      // The key is a short hash of this; of name and time, two pictures of one second had the same.
      getFileHashParts: () => [randomUUID()],
    },
  )
    .input(photoInputSchema)
    .middleware(({ req, files, input }) => {
      const ctx = contexts.get(req);
      if (!ctx) throw new Error("the upload's door was not passed");
      try {
        const [first] = files;
        if (!first) throw new AppError("photo-empty");
        if (files.length > 1) throw new AppError("photos-too-many", { most: MOST_PHOTOS });
        const refused = refuseFile(first);
        if (refused) throw new AppError(refused);
        checkAdmission(ctx.db.reader, ctx, input);
        return {
          ...input,
          personId: requirePerson(ctx),
          // What a phone calls its picture is nobody's business, and may break an address.
          [UTFiles]: [
            { name: ORIGINAL_NAME, size: first.size, type: first.type, customId: randomUUID() },
          ],
        };
      } catch (error) {
        throw kitError(error, ctx);
      }
    })
    .onUploadError(({ fileKey }) => log.warn("upload-broke-off", { fileKey }))
    .onUploadComplete(({ req, metadata, file: { key } }) => complete(req, metadata, key)),
} satisfies FileRouter;

let handle: ((request: Request) => Promise<Response>) | undefined;

/**
 * Hands a request to the kit.
 *
 * @param ctx of the person who was let in; null for a call of the storage, which proves itself by signature
 */
export function handleByKit(request: Request, ctx: Context | null): Promise<Response> {
  if (ctx) contexts.set(request, ctx);
  if (!handle) {
    const { publicUrl, storage: found } = settings();
    handle = createRouteHandler({
      router,
      config: {
        token: found.token,
        ingestUrl: found.ingestUrl,
        // Never what a request calls its host: that could be anybody's.
        callbackUrl: `${publicUrl}/api/uploadthing`,
        isDev: false,
        handleDaemonPromise: "await",
        // More than this writes signed addresses into the log.
        logLevel: "Error",
        logFormat: "json",
      },
    });
  }
  return handle(request);
}
