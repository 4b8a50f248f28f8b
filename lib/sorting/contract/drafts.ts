/** Sessions under way: kept on the server while they are put aside, and seen by whoever else opens them. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { codeSchema, idSchema } from "@/lib/core/schemas";
import { MOST_BAGS } from "../terms";

/** What was typed, as the page writes it: kept, never read by the server. */
const contentSchema = z.string().max(120_000, "too-long");

const someoneSchema = z.object({ id: z.string(), name: z.string() });

export const draftSchema = z.object({
  id: z.string(),
  /** Goes up with every change; 0 before the first. */
  version: z.number().int(),
  codes: z.array(z.string()),
  content: z.string(),
  startedAt: z.number().int(),
  changedAt: z.number().int(),
  changedBy: someoneSchema,
  /** Others who have it open at this moment. */
  others: z.array(someoneSchema),
});
export type SortingDraft = z.output<typeof draftSchema>;

export const listDraftsEndpoint = endpoint({
  method: "GET",
  path: "/api/sortings/drafts",
  summary: "Sessions that were put aside or are under way, last changed first.",
  permission: "sorting.record",
  input: z.object({}),
  output: z.object({
    drafts: z.array(
      draftSchema
        .omit({ content: true })
        .extend({ netGrams: z.number().int(), startedBy: someoneSchema }),
    ),
  }),
});

export const openDraftEndpoint = endpoint({
  method: "POST",
  path: "/api/sortings/drafts/{id}/open",
  summary: "One session under way with what was typed; asking for it says that you have it open.",
  permission: "sorting.record",
  input: z.object({ id: idSchema<"sorting">() }),
  output: draftSchema,
});

export const saveDraftEndpoint = endpoint({
  method: "PUT",
  path: "/api/sortings/drafts/{id}",
  summary:
    "Keep what was typed. Refused when somebody changed it since `version`; the same content again is no change.",
  permission: "sorting.record",
  input: z.object({
    id: idSchema<"sorting">(),
    /** The version that this builds on. */
    version: z.number().int().min(0),
    codes: z.array(codeSchema).max(MOST_BAGS, "too-many"),
    content: contentSchema,
  }),
  output: draftSchema,
});
export type SaveDraftInput = z.output<(typeof saveDraftEndpoint)["input"]>;

export const giveUpDraftEndpoint = endpoint({
  method: "DELETE",
  path: "/api/sortings/drafts/{id}",
  summary: "Give a session up: its bags wait again.",
  permission: "sorting.record",
  input: z.object({ id: idSchema<"sorting">(), version: z.number().int().min(0) }),
  output: z.object({ id: z.string() }),
});
