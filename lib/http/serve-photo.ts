/** One picture out of the storage, under our own headers; where it lies there is never told. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { Context } from "@/lib/platform/context";
import { log } from "@/lib/platform/logger";
import { storage } from "@/lib/platform/storage";
import type { photoFileEndpoint } from "@/lib/uploads/contract";
import { getPhotoFile } from "@/lib/uploads/queries/photos";

/** For an hour without asking; then the browser asks, and permission is checked, with the tag it has. */
const CACHING = "private, max-age=3600";

/** GET /api/photos/{id} */
export async function servePhoto(
  ctx: Context,
  input: z.output<typeof photoFileEndpoint.input>,
  request: Request,
): Promise<Response> {
  const { key, etag } = getPhotoFile(ctx, input);
  const headers = {
    etag,
    "cache-control": CACHING,
    // Another person at the same browser has another cookie, and gets no picture from before.
    vary: "cookie",
    "content-type": "image/jpeg",
    "content-disposition": "inline",
    "content-security-policy": "default-src 'none'; sandbox",
  };
  const known = request.headers.get("if-none-match");
  if (known?.split(/\s*,\s*/).includes(etag)) return new Response(null, { status: 304, headers });
  const stored = await storage().open(key);
  if (!stored) {
    log.error("photo-missing", "the storage has no such file", { photo: input.id });
    throw new AppError("not-found");
  }
  const length = stored.headers.get("content-length");
  return new Response(stored.body, {
    headers: length === null ? headers : { ...headers, "content-length": length },
  });
}
