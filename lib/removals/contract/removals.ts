/** Removals: what leaves the shed. Readings are whole milligrams, nets whole grams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  daySchema,
  idSchema,
  readingSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { BASES } from "@/lib/ledger/terms";
import { RECORD_STATES } from "@/lib/stock/terms";
import { MOST_LOTS, MOST_READINGS, REMOVAL_SOURCES, ROUTES } from "../terms";

/** Up to 100 tonnes. */
const gramsSchema = z.number().int().min(1).max(100_000_000);

const loadFields = {
  /** null: the reject bin. */
  lotNumber: z.number().int().min(1).nullable(),
};
/** Nothing is left there: what the book still holds is difference. */
const wholeField = { whole: z.boolean().default(false) };

/** How the weight is known. */
export const takingSchema = z
  .discriminatedUnion("how", [
    z.object({
      how: z.literal("weighed"),
      scaleId: idSchema<"scale">(),
      loads: z
        .array(
          z.object({
            ...loadFields,
            ...wholeField,
            readings: z.array(readingSchema).min(1).max(MOST_READINGS),
          }),
        )
        .min(1)
        .max(MOST_LOTS),
    }),
    z.object({
      how: z.literal("stated"),
      loads: z
        .array(z.object({ ...loadFields, ...wholeField, grams: gramsSchema }))
        .min(1)
        .max(MOST_LOTS),
    }),
    /** Emptied whole, as the book says. */
    z.object({
      how: z.literal("book"),
      loads: z.array(z.object(loadFields)).min(1).max(MOST_LOTS),
    }),
  ])
  .refine(({ loads }) => loads.length === 1 || loads.every(({ lotNumber }) => lotNumber !== null), {
    error: "mixed-sources",
    path: ["loads"],
  });
export type Taking = z.output<typeof takingSchema>;

export const removalDataSchema = z.object({
  destinationId: idSchema<"destination">(),
  day: daySchema,
  /** Transfer note or ticket of the carrier. */
  noteNumber: z.string().trim().max(60, "too-long"),
  taking: takingSchema,
  /** It is more than the book holds, was weighed again, and stays so. */
  confirmedAbove: z.boolean().default(false),
  /** Grams that are reserved for a run may be taken: it was asked. */
  reservedToo: z.boolean().optional(),
});
export type RemovalData = z.output<typeof removalDataSchema>;

export const removalReceiptSchema = z.object({
  id: idSchema<"removal">(),
  source: z.enum(REMOVAL_SOURCES),
  route: z.enum(ROUTES),
  grams: z.number().int(),
  /** Book less what was taken, where the place is empty now: above zero something was missing, below there was more. */
  differenceGrams: z.number().int(),
  basis: z.enum(BASES),
  recordedAt: z.number().int(),
  undoUntil: z.number().int(),
});
export type RemovalReceipt = z.output<typeof removalReceiptSchema>;

export const takeAwayEndpoint = endpoint({
  method: "POST",
  path: "/api/removals",
  summary: "Rejects or stock leave the shed, disposed of or passed on.",
  permission: "removals.record",
  input: removalDataSchema.extend({
    /** Made by the client; the id of the removal. */
    requestId: requestIdSchema,
  }),
  output: removalReceiptSchema,
});
export type TakeAwayInput = z.output<(typeof takeAwayEndpoint)["input"]>;

export const undoRemovalEndpoint = endpoint({
  method: "POST",
  path: "/api/removals/{id}/undo",
  summary: "Take a removal back, within ten minutes and by whoever saved it.",
  permission: "removals.record",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"removal">() }),
  output: z.object({ id: z.string(), state: z.enum(RECORD_STATES) }),
});

export const correctRemovalEndpoint = endpoint({
  method: "POST",
  path: "/api/removals/{id}/correct",
  summary:
    "Take a removal back and say what should have stood there; it always goes through, and its receipt goes along.",
  permission: "removals.record",
  input: z.object({
    /** Made by the client; the id of the removal that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"removal">(),
    reason: reasonSchema,
    /** null: nothing was taken away. */
    replacement: removalDataSchema.omit({ confirmedAbove: true, reservedToo: true }).nullable(),
  }),
  output: z.object({
    id: z.string(),
    replacementId: z.string().nullable(),
    grams: z.number().int().nullable(),
    /** What became of the receipt of the removal that was wrong. */
    receipt: z.enum(["none", "kept", "taken-back"]),
  }),
});
export type CorrectRemovalInput = z.output<(typeof correctRemovalEndpoint)["input"]>;
export type CorrectRemovalReceipt = z.output<(typeof correctRemovalEndpoint)["output"]>;

export const lotToTakeEndpoint = endpoint({
  method: "GET",
  path: "/api/removals/lots/{number}",
  summary: "A lot that could be taken away: what it is and what the book holds.",
  permission: "removals.record",
  input: z.object({ number: z.coerce.number().int().min(1) }),
  output: z.object({
    number: z.number().int(),
    name: z.string(),
    detail: z.string(),
    heldGrams: z.number().int(),
  }),
});
export type LotToTake = z.output<(typeof lotToTakeEndpoint)["output"]>;
