/** Correcting weigh-ins, and deciding about second readings. */
import * as z from "zod";
import { BAG_STATES } from "@/lib/bags/terms";
import { endpoint } from "@/lib/core/endpoint";
import { KINDS, POLYMER_ANSWERS } from "@/lib/core/plastics";
import {
  idSchema,
  instantSchema,
  laterUsesSchema,
  readingSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { BASES } from "@/lib/ledger/terms";
import { CONDITIONS, MOST_READINGS, WEIGH_IN_STATES } from "../terms";

/** What should have been saved: all of it, as the form shows it; nothing when the weighing never was. */
export const correctedWeighInSchema = z.object({
  scaleId: idSchema<"scale">(),
  occurredAt: instantSchema,
  readings: z.array(readingSchema).min(1).max(MOST_READINGS),
  polymer: z.enum(POLYMER_ANSWERS),
  kind: z.enum(KINDS).nullable(),
  colourCode: z.string().min(1).max(40).nullable(),
  oneKind: z.boolean(),
  condition: z.enum(CONDITIONS),
  pointId: idSchema<"point">(),
});

export const correctWeighInEndpoint = endpoint({
  method: "POST",
  path: "/api/weigh-ins/{id}/correct",
  summary:
    "Take a weigh-in back and say what should have stood there, as one act; it always goes through",
  permission: "weighing.review",
  input: z.object({
    /** Made by the client; the id of the weigh-in that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"weigh-in">(),
    reason: reasonSchema,
    replacement: correctedWeighInSchema.nullable(),
  }),
  output: z.object({
    id: z.string(),
    replacementId: z.string().nullable(),
    code: z.string(),
    netGrams: z.number().nullable(),
    bagState: z.enum(BAG_STATES),
    later: laterUsesSchema,
  }),
});
export type CorrectWeighInInput = z.output<(typeof correctWeighInEndpoint)["input"]>;
export type CorrectWeighInReceipt = z.output<(typeof correctWeighInEndpoint)["output"]>;

const reviewInputSchema = z.object({
  requestId: requestIdSchema,
  /** The second reading. */
  id: idSchema<"weigh-in">(),
  reason: reasonSchema,
});

export const acceptReadingEndpoint = endpoint({
  method: "POST",
  path: "/api/weigh-ins/{id}/accept",
  summary: "Let a second reading stand in the place of the first",
  permission: "weighing.review",
  input: reviewInputSchema,
  output: correctWeighInEndpoint.output,
});

export const discardReadingEndpoint = endpoint({
  method: "POST",
  path: "/api/weigh-ins/{id}/discard",
  summary: "Set a second reading aside; the first stands",
  permission: "weighing.review",
  input: reviewInputSchema,
  output: z.object({ id: z.string(), code: z.string() }),
});
export type ReviewReadingInput = z.output<typeof reviewInputSchema>;

export const listForReviewEndpoint = endpoint({
  method: "GET",
  path: "/api/weigh-ins/for-review",
  summary: "Second readings that nobody has decided about, with the reading that counts",
  permission: "weighing.review",
  input: z.object({}),
  output: z.object({
    readings: z.array(
      z.object({
        id: z.string(),
        code: z.string(),
        pointName: z.string(),
        netGrams: z.number().int(),
        occurredAt: z.number().int(),
        byName: z.string(),
        /** null: the reading that counted was taken back since. */
        first: z
          .object({
            id: z.string(),
            netGrams: z.number().int(),
            occurredAt: z.number().int(),
            byName: z.string(),
          })
          .nullable(),
      }),
    ),
  }),
});
export type ForReview = z.output<(typeof listForReviewEndpoint)["output"]>["readings"][number];

/** One weigh-in with all that was typed, and what became of it. */
export const weighInPageSchema = correctedWeighInSchema.extend({
  id: z.string(),
  code: z.string(),
  state: z.enum(WEIGH_IN_STATES),
  netGrams: z.number().int(),
  basis: z.enum(BASES),
  belowMinimum: z.boolean(),
  recordedAt: z.number().int(),
  pointName: z.string(),
  scaleName: z.string(),
  colourName: z.string().nullable(),
  /** The lot that a bag of one kind went into. */
  lotNumber: z.number().int().nullable(),
  byName: z.string(),
  corrects: z.string().nullable(),
  correction: z
    .object({
      /** null: erased. */
      reason: z.string().nullable(),
      replacementId: z.string().nullable(),
      byName: z.string(),
      at: z.number().int(),
    })
    .nullable(),
  /** What was taken since from what it had filled; empty for one that never counted. */
  later: laterUsesSchema,
});
export type WeighInPage = z.output<typeof weighInPageSchema>;
