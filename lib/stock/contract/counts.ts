/** Counting lots: what a client sends and reads. Readings are whole milligrams, nets whole grams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { FORMS, KINDS, POLYMER_ANSWERS, WASH_STATES } from "@/lib/core/plastics";
import {
  idSchema,
  instantSchema,
  laterUsesSchema,
  lineSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { BASES } from "@/lib/ledger/terms";
import { COUNT_KINDS, RECORD_STATES } from "../terms";
import { foundSchema, lotNumberSchema, weighedSchema } from "./weighed";

/** What the client saw of a lot before it was counted: a count in between is told. */
export const seenSchema = z.object({
  /** Number of the last entry that touched it; 0 for none. */
  entryId: z.number().int().min(0),
  /** Its last count, whether or not it moved anything. */
  countId: z.string().nullable(),
});

export const countReceiptSchema = z.object({
  countId: idSchema<"count">(),
  number: z.number().int(),
  kind: z.enum(COUNT_KINDS),
  bookGrams: z.number().int(),
  countedGrams: z.number().int(),
  /** Counted less book. */
  differenceGrams: z.number().int(),
  /** The lot closed with it. */
  closed: z.boolean(),
  recordedAt: z.number().int(),
  undoUntil: z.number().int(),
});
export type CountReceipt = z.output<typeof countReceiptSchema>;

export const countLotEndpoint = endpoint({
  method: "POST",
  path: "/api/lots/{number}/counts",
  summary: "Say what is really in a lot's container; the lot becomes what was counted.",
  permission: "stock.count",
  input: z.object({
    /** Made by the client; the id of the count. */
    requestId: requestIdSchema,
    number: lotNumberSchema,
    occurredAt: instantSchema,
    counted: foundSchema,
    seen: seenSchema,
    /** Somebody counted or moved it meanwhile, that was told, and this count shall stand. */
    confirmed: z.boolean().default(false),
  }),
  output: countReceiptSchema,
});
export type CountLotInput = z.output<(typeof countLotEndpoint)["input"]>;

export const openStockEndpoint = endpoint({
  method: "POST",
  path: "/api/stock/openings",
  summary:
    "Enter what stood in the shed on the scheme's first day: one new lot with the number of its signed count sheet.",
  permission: "stock.opening",
  input: weighedSchema.extend({
    /** Made by the client; the id of the count. */
    requestId: requestIdSchema,
    polymer: z.enum(POLYMER_ANSWERS),
    kind: z.enum(KINDS),
    colourCode: z.string().min(1).max(40),
    form: z.enum(FORMS).default("whole"),
    wash: z.enum(WASH_STATES).default("as-received"),
    place: z.string().trim().max(80, "too-long").default(""),
    /** Number of the signed count sheet, and who signed it. */
    sheet: lineSchema(120),
    occurredAt: instantSchema,
  }),
  output: countReceiptSchema,
});
export type OpenStockInput = z.output<(typeof openStockEndpoint)["input"]>;

export const undoCountEndpoint = endpoint({
  method: "POST",
  path: "/api/counts/{id}/undo",
  summary: "Take a count back, within ten minutes and by whoever saved it.",
  permission: "stock.count",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"count">() }),
  output: z.object({
    countId: idSchema<"count">(),
    number: z.number().int(),
    heldGrams: z.number().int(),
  }),
});
export type UndoCountInput = z.output<(typeof undoCountEndpoint)["input"]>;

export const acceptCountEndpoint = endpoint({
  method: "POST",
  path: "/api/counts/{id}/accept",
  summary: "A lead has looked at a count and lets it stand.",
  permission: "stock.review",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"count">() }),
  output: z.object({ countId: idSchema<"count">(), reviewedAt: z.number().int() }),
});
export type AcceptCountInput = z.output<(typeof acceptCountEndpoint)["input"]>;

export const correctCountEndpoint = endpoint({
  method: "POST",
  path: "/api/counts/{id}/correct",
  summary:
    "Take a count back and say what was there, as one act; it always goes through. Without a replacement it is only taken back.",
  permission: "stock.review",
  input: z.object({
    /** Made by the client; the id of the count that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"count">(),
    reason: reasonSchema,
    replacement: foundSchema.nullable(),
  }),
  output: z.object({
    countId: idSchema<"count">(),
    replacementId: idSchema<"count">().nullable(),
    number: z.number().int(),
    heldGrams: z.number().int(),
    later: laterUsesSchema,
  }),
});
export type CorrectCountInput = z.output<(typeof correctCountEndpoint)["input"]>;

export const countViewSchema = z.object({
  countId: idSchema<"count">(),
  kind: z.enum(COUNT_KINDS),
  number: z.number().int(),
  /** Words of the lot: "Blue HDPE, lids, whole, as received". */
  material: z.string(),
  bookGrams: z.number().int(),
  countedGrams: z.number().int(),
  basis: z.enum(BASES),
  scaleName: z.string().nullable(),
  sheet: z.string().nullable(),
  state: z.enum(RECORD_STATES),
  byName: z.string(),
  occurredAt: z.number().int(),
  recordedAt: z.number().int(),
  reviewedBy: z.string().nullable(),
  reviewedAt: z.number().int().nullable(),
  /** null when it is not the reader's to undo, or the time is over. */
  undoUntil: z.number().int().nullable(),
  /** The count in whose place it stands. */
  corrects: z.string().nullable(),
  /** Why it was corrected; null when it was not, or the reason was erased. */
  reason: z.string().nullable(),
});
export type CountView = z.output<typeof countViewSchema>;

export const countsToReviewEndpoint = endpoint({
  method: "GET",
  path: "/api/counts/to-review",
  summary: "Counts that nobody has looked at, oldest first, in pages.",
  permission: "stock.review",
  input: z.object({ after: z.string().max(80).optional() }),
  output: z.object({
    counts: z.array(countViewSchema),
    next: z.string().nullable(),
    waiting: z.number().int(),
  }),
});
