/** Tags and bags: what goes over the wire. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { codeSchema, idSchema, instantSchema, requestIdSchema } from "@/lib/core/schemas";
import { BAG_STATES } from "./terms";

/** Largest order: 500 tags are 24 sheets of A4 and one short transaction. */
export const MOST_TAGS = 500;

export const orderTagsSchema = z.object({
  requestId: requestIdSchema,
  count: z.number().int("whole-number").min(1, "too-few").max(MOST_TAGS, "too-many"),
  /** null: for no point yet. */
  pointId: idSchema<"point">().nullable(),
});
export const tagOrderSchema = z.object({
  id: idSchema<"tag-order">(),
  count: z.number().int(),
  pointId: idSchema<"point">().nullable(),
  orderedAt: instantSchema,
});
export type TagOrderReceipt = z.output<typeof tagOrderSchema>;
export const orderTagsEndpoint = endpoint({
  method: "POST",
  path: "/api/tag-orders",
  summary: "Draw codes for new tags. The order's id is the request's.",
  permission: "tags.order",
  input: orderTagsSchema,
  output: tagOrderSchema,
});

export const bagSchema = z.object({
  id: idSchema<"bag">(),
  /** The bag's first code; a replaced tag adds another. */
  code: z.string(),
  pointId: idSchema<"point">().nullable(),
  pointName: z.string().nullable(),
  state: z.enum(BAG_STATES),
  stateSince: instantSchema,
});
export type BagReceipt = z.output<typeof bagSchema>;

export const giveSpareTagSchema = z.object({
  requestId: requestIdSchema,
  /** "At the shed" or "Not known"; without it, "Not known". */
  pointId: idSchema<"point">().optional(),
  /** A printed tag without a point; without it, a new code is drawn, to be written on the bag. */
  code: codeSchema.optional(),
});
export const giveSpareTagEndpoint = endpoint({
  method: "POST",
  path: "/api/bags/spare",
  summary: "Give a bag without a tag a spare one.",
  permission: "bags.tag",
  input: giveSpareTagSchema,
  output: bagSchema,
});

export const replaceTagSchema = z.object({
  requestId: requestIdSchema,
  /** A code that the bag has. */
  code: codeSchema,
  /** A printed tag without a point; without it, a new code is drawn. */
  newCode: codeSchema.optional(),
});
export const replaceTagEndpoint = endpoint({
  method: "POST",
  path: "/api/bags/{code}/replace-tag",
  summary: "Give a bag another tag. Both codes open the same bag.",
  permission: "bags.tag",
  input: replaceTagSchema,
  output: z.object({ bag: bagSchema, newCode: z.string() }),
});
