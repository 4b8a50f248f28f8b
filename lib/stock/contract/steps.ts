/** Washing, drying, shredding: what a client sends and reads. Readings are whole milligrams, nets whole grams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { FORMS, KINDS, POLYMER_ANSWERS, WASH_STATES } from "@/lib/core/plastics";
import {
  idSchema,
  instantSchema,
  laterUsesSchema,
  readingSchema,
  reasonSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { LOSS_CAUSES } from "@/lib/ledger/terms";
import {
  MOST_READINGS,
  MOST_STEP_INPUTS,
  MOST_STEP_OUTPUTS,
  RECORD_STATES,
  STEP_KINDS,
  TAKING,
} from "../terms";
import { lotNumberSchema, onTheSpotSchema } from "./weighed";

const gramsSchema = z.number().int().min(1, "empty").max(100_000_000);

/**
 * How much went in of one lot.
 * - all: everything that the book holds; not weighed.
 * - taken: weighed as taken out; `all` when the container is empty now.
 * - weighed-back: the container before, less the container after.
 * - stated: grams as somebody knows them; in a correction only.
 */
export const stepAmountSchema = z.discriminatedUnion("how", [
  z.object({ how: z.literal("all") }),
  z.object({
    how: z.literal("taken"),
    scaleId: idSchema<"scale">(),
    readings: z.array(readingSchema).min(1).max(MOST_READINGS),
    all: z.boolean().default(false),
  }),
  z.object({
    how: z.literal("weighed-back"),
    scaleId: idSchema<"scale">(),
    before: readingSchema,
    after: readingSchema,
  }),
  z.object({ how: z.literal("stated"), grams: gramsSchema }),
]);
export type StepAmountInput = z.output<typeof stepAmountSchema>;

export const stepInputSchema = z.object({
  number: lotNumberSchema,
  amount: stepAmountSchema,
  /** What is left in the container: asked for when more was taken than the book held. */
  count: onTheSpotSchema,
});
export type StepInput = z.output<typeof stepInputSchema>;

/** One reading of what came out. Kind and colour may be left out where only one went in. */
export const stepOutputSchema = z.object({
  kind: z.enum(KINDS).nullable().default(null),
  colourCode: z.string().min(1).max(40).nullable().default(null),
  scaleId: idSchema<"scale">(),
  reading: readingSchema,
});
export type StepOutput = z.output<typeof stepOutputSchema>;

const stepFields = {
  kind: z.enum(STEP_KINDS),
  occurredAt: instantSchema,
  /** How long it took. */
  minutes: z
    .number()
    .int()
    .min(1, "empty")
    .max(20_160, "too-long-minutes")
    .nullable()
    .default(null),
  inputs: z.array(stepInputSchema).min(1, "empty").max(MOST_STEP_INPUTS),
  outputs: z.array(stepOutputSchema).min(1, "empty").max(MOST_STEP_OUTPUTS),
  /** What was lost and weighed or guessed, by cause. */
  losses: z
    .array(z.object({ cause: z.enum(LOSS_CAUSES), grams: gramsSchema }))
    .max(LOSS_CAUSES.length)
    .default([]),
  /** Where the rest went; needed only when the scale cannot explain it. */
  cause: z.enum(LOSS_CAUSES).nullable().default(null),
  /** More came out than went in, it was weighed again, and it stays so. */
  confirmed: z.boolean().default(false),
};

export const saveStepSchema = z.object({
  /** Made by the client; the id of the step. */
  requestId: requestIdSchema,
  ...stepFields,
  /** Grams that are reserved for a run may be taken: it was asked. */
  reservedToo: z.boolean().optional(),
});
export type SaveStepInput = z.output<typeof saveStepSchema>;
export type StepContent = Omit<SaveStepInput, "requestId" | "reservedToo">;

export const stepReceiptSchema = z.object({
  stepId: idSchema<"step">(),
  kind: z.enum(STEP_KINDS),
  inputGrams: z.number().int(),
  outputGrams: z.number().int(),
  lossGrams: z.number().int(),
  /** What is left of input less output less losses; below zero for a gain. */
  differenceGrams: z.number().int(),
  outputs: z.array(
    z.object({
      number: z.number().int(),
      opened: z.boolean(),
      grams: z.number().int(),
      heldGrams: z.number().int(),
    }),
  ),
  /** Lots that closed because this step started from them. */
  closed: z.array(z.number().int()),
  recordedAt: z.number().int(),
  undoUntil: z.number().int(),
});
export type StepReceipt = z.output<typeof stepReceiptSchema>;

export const saveStepEndpoint = endpoint({
  method: "POST",
  path: "/api/steps",
  summary: "Wash, dry or shred: from lots of one polymer to another form or wash state.",
  permission: "steps.record",
  input: saveStepSchema,
  output: stepReceiptSchema,
});

export const undoStepEndpoint = endpoint({
  method: "POST",
  path: "/api/steps/{id}/undo",
  summary:
    "Take a step back, within ten minutes and by whoever saved it. Lots that it opened stay.",
  permission: "steps.record",
  input: z.object({ requestId: requestIdSchema, id: idSchema<"step">() }),
  output: z.object({ stepId: idSchema<"step">(), lots: z.array(z.number().int()) }),
});
export type UndoStepInput = z.output<(typeof undoStepEndpoint)["input"]>;

export const correctStepEndpoint = endpoint({
  method: "POST",
  path: "/api/steps/{id}/correct",
  summary:
    "Take a step back and say what should have stood there, as one act; it always goes through. Without a replacement it is only taken back.",
  permission: "steps.record",
  input: z.object({
    /** Made by the client; the id of the step that stands in its place. */
    requestId: requestIdSchema,
    id: idSchema<"step">(),
    reason: reasonSchema,
    replacement: z.object(stepFields).nullable(),
  }),
  output: z.object({
    stepId: idSchema<"step">(),
    replacementId: idSchema<"step">().nullable(),
    later: laterUsesSchema,
  }),
});
export type CorrectStepInput = z.output<(typeof correctStepEndpoint)["input"]>;

const materialFields = {
  polymer: z.enum(POLYMER_ANSWERS),
  kind: z.enum(KINDS),
  colourCode: z.string(),
  colourName: z.string(),
  colourHex: z.string(),
  colourLook: z.enum(["solid", "clear", "mixed"]),
  form: z.enum(FORMS),
  wash: z.enum(WASH_STATES),
};

export const stepSummarySchema = z.object({
  stepId: idSchema<"step">(),
  kind: z.enum(STEP_KINDS),
  polymer: z.enum(POLYMER_ANSWERS),
  inputGrams: z.number().int(),
  outputGrams: z.number().int(),
  lossGrams: z.number().int(),
  minutes: z.number().int().nullable(),
  fromNumbers: z.array(z.number().int()),
  toNumbers: z.array(z.number().int()),
  state: z.enum(RECORD_STATES),
  byName: z.string(),
  occurredAt: z.number().int(),
});
export type StepSummary = z.output<typeof stepSummarySchema>;

export const listStepsEndpoint = endpoint({
  method: "GET",
  path: "/api/steps",
  summary: "Steps, newest first, in pages.",
  permission: "stock.read",
  input: z.object({
    kind: z.enum(STEP_KINDS).optional().catch(undefined),
    before: z.string().max(80).optional().catch(undefined),
  }),
  output: z.object({ steps: z.array(stepSummarySchema), next: z.string().nullable() }),
});

const viewReading = {
  grams: z.number().int(),
  scaleId: z.string().nullable(),
  scaleName: z.string().nullable(),
  grossMilligrams: z.number().int().nullable(),
};

export const stepViewSchema = stepSummarySchema.extend({
  toleranceMilligrams: z.number().int(),
  recordedAt: z.number().int(),
  undoUntil: z.number().int().nullable(),
  corrects: z.string().nullable(),
  /** Who corrected it, why, and what stands in its place. */
  correction: z
    .object({
      reason: z.string().nullable(),
      byName: z.string(),
      at: z.number().int(),
      replacementId: z.string().nullable(),
    })
    .nullable(),
  inputs: z.array(
    z.object({
      number: z.number().int(),
      ...materialFields,
      ...viewReading,
      taking: z.enum(TAKING),
      lessMilligrams: z.number().int().nullable(),
    }),
  ),
  outputs: z.array(
    z.object({
      number: z.number().int(),
      ...materialFields,
      ...viewReading,
      tareMilligrams: z.number().int(),
    }),
  ),
  losses: z.array(z.object({ cause: z.enum(LOSS_CAUSES), grams: z.number().int() })),
});
export type StepView = z.output<typeof stepViewSchema>;

export const ownLossSchema = z.object({
  kind: z.enum(STEP_KINDS),
  /** Steps that it rests on. */
  count: z.number().int(),
  /** Mean share of the input that did not come out, 0 to 1; below zero where water came in. null without a step. */
  mean: z.number().nullable(),
  /** Standard deviation of those shares; null under two steps. */
  spread: z.number().nullable(),
});
export type OwnLoss = z.output<typeof ownLossSchema>;
