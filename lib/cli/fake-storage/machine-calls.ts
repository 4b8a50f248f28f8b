/** Calls of the program itself, which prove themselves by the key of the token. */
import * as z from "zod";
import { Refusal } from "./answers";
import type { Desk } from "./upload";

const announced = z.object({
  fileKeys: z.array(z.string()).min(1).max(100),
  metadata: z.unknown(),
  isDev: z.literal(false),
  callbackUrl: z.string(),
  callbackSlug: z.string(),
  awaitServerData: z.literal(true),
});
const result = z.object({ fileKey: z.string(), callbackData: z.unknown() });
const keys = z.object({ fileKeys: z.array(z.string()).max(1000) });
const page = z.object({
  limit: z.number().int().min(1).max(1000).default(500),
  offset: z.number().int().min(0).default(0),
});

function read<Schema extends z.ZodType>(schema: Schema, body: unknown): z.output<Schema> {
  const parsed = schema.safeParse(body);
  if (!parsed.success) throw new Refusal(400, parsed.error.issues[0]?.message ?? "not valid");
  return parsed.data;
}

type Call = (desk: Desk, body: unknown, callbacks: string) => unknown;

const CALLS: Readonly<Record<string, Call>> = {
  "/route-metadata": (desk, body, callbacks) => {
    const { fileKeys, metadata, callbackUrl, callbackSlug } = read(announced, body);
    // Nobody else is ever called with our signature.
    if (callbackUrl.split("?", 1)[0] !== callbacks || !URL.canParse(callbackUrl)) {
      throw new Refusal(400, "the completion is not under PUBLIC_URL");
    }
    for (const key of fileKeys) {
      desk.announcements.add(key, {
        metadata,
        callbackUrl,
        slug: callbackSlug,
        announcedAt: Date.now(),
      });
    }
    return { ok: true };
  },

  "/callback-result": (desk, body) => {
    const { fileKey, callbackData } = read(result, body);
    desk.announcements.setResult(fileKey, callbackData);
    return { ok: true };
  },

  "/v6/deleteFiles": (desk, body) => {
    const { fileKeys } = read(keys, body);
    return {
      success: true,
      deletedCount: fileKeys.filter((key) => desk.store.remove(key)).length,
    };
  },

  "/v6/listFiles": (desk, body) => {
    const { limit, offset } = read(page, body);
    const all = desk.store.list();
    return {
      hasMore: offset + limit < all.length,
      files: all.slice(offset, offset + limit).map((file) => ({
        id: file.key,
        customId: file.customId,
        key: file.key,
        name: file.name,
        size: file.size,
        status: "Uploaded",
        uploadedAt: file.uploadedAt,
      })),
    };
  },
};

/** Is this path one of the program's calls? */
export function isMachineCall(path: string): boolean {
  return Object.hasOwn(CALLS, path);
}

/**
 * Answers one.
 *
 * @param callbacks the one address that may be called when a file has come
 * @throws Refusal 400 for a body that is none of the protocol's
 */
export function answerMachineCall(
  desk: Desk,
  path: string,
  body: unknown,
  callbacks: string,
): unknown {
  return CALLS[path]?.(desk, body, callbacks);
}
