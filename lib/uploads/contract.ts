/**
 * Photos of a subject: list, one picture, remove. Adding one goes through the storage service's own protocol
 * (`app/api/uploadthing/route.ts`); what its request carries is {@link photoInputSchema}.
 */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { idSchema, requestIdSchema } from "@/lib/core/schemas";
import { PHOTO_PURPOSES, PHOTO_SIZES, PHOTO_SUBJECTS } from "./terms";

/** Sent with a file: one file for each request, so that each can be cancelled and tried again by itself. */
export const photoInputSchema = z.object({
  photoId: idSchema<"photo">(),
  subjectKind: z.enum(PHOTO_SUBJECTS),
  subjectId: z.string().min(1).max(64),
  purpose: z.enum(PHOTO_PURPOSES).default("view"),
});
export type PhotoInput = z.output<typeof photoInputSchema>;

export const photoSchema = z.object({
  id: z.string(),
  purpose: z.enum(PHOTO_PURPOSES),
  width: z.number().int(),
  height: z.number().int(),
  addedAt: z.number().int(),
  /** Null when the name was erased. */
  addedBy: z.string().nullable(),
  /** CIELAB (D65) of the middle; of a chip photo only. */
  lab: z.object({ l: z.number(), a: z.number(), b: z.number() }).nullable(),
});
export type Photo = z.output<typeof photoSchema>;

/** What the completion of an upload tells the client (`serverData` of the storage's answer). */
export const uploadedSchema = z.union([
  z.object({ ok: z.literal(true), photo: photoSchema }),
  z.object({ ok: z.literal(false), reason: z.string() }),
]);

export type Uploaded = z.output<typeof uploadedSchema>;

export const listPhotosEndpoint = endpoint({
  method: "GET",
  path: "/api/photos",
  summary:
    "Photos of one weigh-in or lot, oldest first. Those of a weigh-in that is not saved yet are seen by their owner only.",
  permission: "photos.read",
  input: z.object({
    subjectKind: z.enum(PHOTO_SUBJECTS),
    subjectId: z.string().min(1).max(64),
  }),
  output: z.object({ photos: z.array(photoSchema) }),
});

export const photoFileEndpoint = endpoint({
  method: "GET",
  path: "/api/photos/{id}",
  summary: "One photo as JPEG: large (longer edge at most 1600 px) or thumb (320 px).",
  permission: "photos.read",
  input: z.object({ id: idSchema<"photo">(), size: z.enum(PHOTO_SIZES).default("large") }),
  output: z.string(),
  produces: "image/jpeg",
});

export const removePhotoEndpoint = endpoint({
  method: "DELETE",
  path: "/api/photos/{id}",
  summary:
    "Removes a photo; who did it stays in the audit. Whoever may not remove others' takes back their own, until what it shows is saved.",
  permission: "photos.add",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"photo">() }),
  output: z.object({ id: z.string() }),
});
