/** Lots: lists, one lot's page, its movements, its place. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { FORMS, KINDS, POLYMER_ANSWERS, WASH_STATES } from "@/lib/core/plastics";
import { idSchema, requestIdSchema } from "@/lib/core/schemas";
import { COLOUR_LOOKS, LOT_ENDS, LOT_STATES } from "../terms";
import { lotNumberSchema } from "./weighed";

export const materialSchema = z.object({
  polymer: z.enum(POLYMER_ANSWERS),
  kind: z.enum(KINDS),
  colourCode: z.string(),
  form: z.enum(FORMS),
  wash: z.enum(WASH_STATES),
});
export type Material = z.output<typeof materialSchema>;

export const lotSummarySchema = materialSchema.extend({
  number: z.number().int(),
  colourName: z.string(),
  colourHex: z.string(),
  colourLook: z.enum(COLOUR_LOOKS),
  place: z.string(),
  openedAt: z.number().int(),
  closedAt: z.number().int().nullable(),
  closedFor: z.enum(LOT_ENDS).nullable(),
  /** The listed container that it lies in. */
  containerName: z.string().nullable(),
  heldGrams: z.number().int(),
});
export type LotSummary = z.output<typeof lotSummarySchema>;

export const listLotsEndpoint = endpoint({
  method: "GET",
  path: "/api/lots",
  summary:
    "Lots, oldest first: those that hold something, that are open, closed, empty, or all; by place, container, polymer, colour, kind, form and wash state.",
  permission: "stock.read",
  input: z.object({
    state: z.enum(LOT_STATES).default("held"),
    polymer: z.enum(POLYMER_ANSWERS).optional(),
    colourCode: z.string().max(40).optional(),
    kind: z.enum(KINDS).optional(),
    form: z.enum(FORMS).optional(),
    wash: z.enum(WASH_STATES).optional(),
    /** Words of the place. */
    place: z.string().trim().max(80).optional(),
    containerId: idSchema<"container">().optional(),
    /** This one alone, whatever its state. */
    number: lotNumberSchema.optional(),
    /** Number of the last lot of the page before. */
    after: lotNumberSchema.optional(),
  }),
  output: z.object({
    lots: z.array(lotSummarySchema),
    /** Pass it as `after` for the next page; null at the end. */
    next: z.number().int().nullable(),
  }),
});

/** The query string of the lots' page; whatever cannot be read there is left out. */
export const lotsPageSchema = z.object({
  polymer: z.enum(POLYMER_ANSWERS).optional().catch(undefined),
  colour: z.string().min(1).max(40).optional().catch(undefined),
  kind: z.enum(KINDS).optional().catch(undefined),
  form: z.enum(FORMS).optional().catch(undefined),
  wash: z.enum(WASH_STATES).optional().catch(undefined),
  state: z.enum(LOT_STATES).optional().catch(undefined),
  container: idSchema<"container">().optional().catch(undefined),
  /** As typed: a lot's number, a label's code, or words of the place. */
  q: z.string().trim().min(1).max(80).optional().catch(undefined),
  after: lotNumberSchema.optional().catch(undefined),
});

/** What a movement belongs to: the step, the count, the other lot of a move, the removal. */
export const lotRecordRefSchema = z.object({
  kind: z.enum(["weigh-in", "sorting", "step", "count", "lot-move", "removal", "other"]),
  id: z.string(),
  /** "shredding", "merge", "empty"; null where the kind says it all. */
  detail: z.string().nullable(),
  /** The other lot of a move. */
  otherNumber: z.number().int().nullable(),
});
export type LotRecordRef = z.output<typeof lotRecordRefSchema>;

export const lotMovementSchema = z.object({
  entryId: z.number().int(),
  seq: z.number().int(),
  kind: z.string(),
  occurredAt: z.number().int(),
  bookedDay: z.string(),
  grams: z.number().int(),
  /** What the lot held once this was in. */
  afterGrams: z.number().int(),
  /** Name of who did it; null when it was the program, or the name was erased. */
  doneBy: z.string().nullable(),
  /** Tag of the bag that it concerns, where there is one. */
  bagCode: z.string().nullable(),
  /** The record behind it, for its words and its link. */
  record: lotRecordRefSchema,
  /** The number of the entry that this one takes back. */
  reverses: z.number().int().nullable(),
});
export type LotMovement = z.output<typeof lotMovementSchema>;

export const lotMovementsEndpoint = endpoint({
  method: "GET",
  path: "/api/lots/{number}/movements",
  summary: "Everything that ever went into or out of a lot, newest first, in pages.",
  permission: "stock.read",
  input: z.object({
    number: lotNumberSchema,
    /** Entry and line of the last movement of the page before, "1204.3". */
    before: z
      .string()
      .regex(/^\d{1,12}\.\d{1,6}$/, "not-a-number")
      .optional(),
  }),
  output: z.object({ movements: z.array(lotMovementSchema), next: z.string().nullable() }),
});

export const setLotPlaceEndpoint = endpoint({
  method: "PUT",
  path: "/api/lots/{number}/place",
  summary: "Says where a lot stands.",
  permission: "stock.edit",
  input: z.object({
    requestId: requestIdSchema,
    number: lotNumberSchema,
    place: z.string().trim().max(80, "too-long"),
  }),
  output: z.object({ number: z.number().int(), place: z.string() }),
});
