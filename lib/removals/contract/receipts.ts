/** The receiver's receipts: what was passed on is proven from their day. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { daySchema, idSchema, lineSchema, reasonSchema, requestIdSchema } from "@/lib/core/schemas";

export const receiptDataSchema = z.object({
  number: lineSchema(60),
  day: daySchema,
  /** What the receiver says that it weighed; kept and shown, never posted. */
  receivedGrams: z.number().int().min(1).max(100_000_000),
});
export type ReceiptData = z.output<typeof receiptDataSchema>;

const enteredSchema = z.object({
  receiptId: z.string(),
  removalId: z.string(),
  number: z.string(),
  provenGrams: z.number().int(),
});

export const enterReceiptEndpoint = endpoint({
  method: "POST",
  path: "/api/removals/{id}/receipt",
  summary: "The receiver's receipt for a removal: proven from its day.",
  permission: "removals.record",
  input: receiptDataSchema.extend({
    /** Made by the client; the id of the receipt. */
    requestId: requestIdSchema,
    id: idSchema<"removal">(),
  }),
  output: enteredSchema,
});

const receiptIdField = { receiptId: idSchema<"removal-receipt">() };

export const undoReceiptEndpoint = endpoint({
  method: "POST",
  path: "/api/removals/{id}/receipt/undo",
  summary: "Take a receipt back, within ten minutes and by whoever saved it.",
  permission: "removals.record",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"removal">(), ...receiptIdField }),
  output: z.object({ receiptId: z.string(), removalId: z.string() }),
});

export const correctReceiptEndpoint = endpoint({
  method: "POST",
  path: "/api/removals/{id}/receipt/correct",
  summary: "Take a receipt back and say what should have stood there; it always goes through.",
  permission: "removals.record",
  input: z.object({
    /** Made by the client; the id of the receipt that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"removal">(),
    ...receiptIdField,
    reason: reasonSchema,
    /** null: there is no receipt. */
    replacement: receiptDataSchema.nullable(),
  }),
  output: z.object({ receiptId: z.string(), replacementId: z.string().nullable() }),
});
