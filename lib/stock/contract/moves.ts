/** From one lot into another: merging, splitting, identifying. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { KINDS, POLYMERS } from "@/lib/core/plastics";
import {
  idSchema,
  instantSchema,
  laterUsesSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { IDENTIFY_METHODS, MOVE_KINDS, RECORD_STATES } from "../terms";
import {
  amountSchema,
  lotAfterSchema,
  lotNumberSchema,
  onTheSpotSchema,
  weighedSchema,
} from "./weighed";

const moveFields = {
  /** Made by the client; the id of the move. */
  requestId: requestIdSchema,
  /** The lot that gives. */
  number: lotNumberSchema,
  occurredAt: instantSchema,
  /** What is left in the container: asked for when more was taken than the book held. */
  count: onTheSpotSchema,
  /** Grams that are reserved for a run may be taken: it was asked. */
  reservedToo: z.boolean().optional(),
};

export const moveReceiptSchema = z.object({
  moveId: idSchema<"lot-move">(),
  kind: z.enum(MOVE_KINDS),
  /** What arrived. */
  grams: z.number().int(),
  /** More (below zero) or less than the book held, posted as difference. */
  differenceGrams: z.number().int(),
  from: lotAfterSchema.extend({ closed: z.boolean() }),
  to: lotAfterSchema.extend({ opened: z.boolean() }),
  recordedAt: z.number().int(),
  undoUntil: z.number().int(),
});
export type MoveReceipt = z.output<typeof moveReceiptSchema>;

export const mergeLotEndpoint = endpoint({
  method: "POST",
  path: "/api/lots/{number}/merge",
  summary: "Pour a lot, or part of it, into another lot of the same material.",
  permission: "stock.move",
  input: z.object({ ...moveFields, toNumber: lotNumberSchema, amount: amountSchema }),
  output: moveReceiptSchema,
});
export type MergeLotInput = z.output<(typeof mergeLotEndpoint)["input"]>;

export const splitLotEndpoint = endpoint({
  method: "POST",
  path: "/api/lots/{number}/split",
  summary: "Put part of a lot into a container of its own: a new lot of the same material.",
  permission: "stock.move",
  input: z.object({
    ...moveFields,
    amount: weighedSchema,
    /** Where the new lot stands. */
    place: z.string().trim().max(80, "too-long").default(""),
  }),
  output: moveReceiptSchema,
});
export type SplitLotInput = z.output<(typeof splitLotEndpoint)["input"]>;

/** What "Not sure" turned out to be. Form and wash state stay. */
const identityFields = {
  polymer: z.enum(POLYMERS),
  kind: z.enum(KINDS),
  colourCode: z.string().min(1).max(40),
  method: z.enum(IDENTIFY_METHODS),
};

export const identifyLotEndpoint = endpoint({
  method: "POST",
  path: "/api/lots/{number}/identify",
  summary:
    "Say what a lot, or part of it, is that nobody was sure of; it moves to the lot of that polymer.",
  permission: "stock.identify",
  input: z.object({ ...moveFields, ...identityFields, amount: amountSchema }),
  output: moveReceiptSchema,
});
export type IdentifyLotInput = z.output<(typeof identifyLotEndpoint)["input"]>;

export const undoMoveEndpoint = endpoint({
  method: "POST",
  path: "/api/lot-moves/{id}/undo",
  summary:
    "Take a move back, within ten minutes and by whoever saved it. A lot that it opened stays.",
  permission: "stock.identify",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"lot-move">() }),
  output: z.object({
    moveId: idSchema<"lot-move">(),
    from: lotAfterSchema,
    to: lotAfterSchema,
  }),
});
export type UndoMoveInput = z.output<(typeof undoMoveEndpoint)["input"]>;

export const correctMoveEndpoint = endpoint({
  method: "POST",
  path: "/api/lot-moves/{id}/correct",
  summary:
    "Take a move back and say what should have stood there, as one act; it always goes through. Without a replacement it is only taken back.",
  permission: "stock.review",
  input: z.object({
    /** Made by the client; the id of the move that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"lot-move">(),
    reason: reasonSchema,
    replacement: z
      .object({
        grams: z.number().int().min(1, "empty").max(100_000_000),
        /** For a merge: the lot that it should have gone to. */
        toNumber: lotNumberSchema.nullable().default(null),
        /** For an identification: what it should have said. */
        identity: z.object(identityFields).nullable().default(null),
      })
      .nullable(),
  }),
  output: z.object({
    moveId: idSchema<"lot-move">(),
    replacementId: idSchema<"lot-move">().nullable(),
    from: lotAfterSchema,
    to: lotAfterSchema,
    later: laterUsesSchema,
  }),
});
export type CorrectMoveInput = z.output<(typeof correctMoveEndpoint)["input"]>;

export const moveViewSchema = z.object({
  moveId: idSchema<"lot-move">(),
  kind: z.enum(MOVE_KINDS),
  fromNumber: z.number().int(),
  toNumber: z.number().int(),
  grams: z.number().int(),
  method: z.enum(IDENTIFY_METHODS).nullable(),
  state: z.enum(RECORD_STATES),
  byName: z.string(),
  occurredAt: z.number().int(),
  recordedAt: z.number().int(),
  undoUntil: z.number().int().nullable(),
  corrects: z.string().nullable(),
  reason: z.string().nullable(),
});
export type MoveView = z.output<typeof moveViewSchema>;
