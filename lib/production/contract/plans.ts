/** Plans: what the stock has for a piece, saved plans, their blends and reservations. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { KINDS } from "@/lib/core/plastics";
import { idSchema, requestIdSchema } from "@/lib/core/schemas";
import { COLOUR_LOOKS, STEP_KINDS } from "@/lib/stock/terms";
import { HEATABLE, MOST_COLOURS, RUN_STATES } from "../terms";

/** What a colour has for a piece: usable as it is, and what steps would add. */
export const colourStockSchema = z.object({
  code: z.string(),
  name: z.string(),
  hex: z.string(),
  look: z.enum(COLOUR_LOOKS),
  freeGrams: z.number(),
  reservedGrams: z.number(),
  /** Part of the usable grams that was heated before, in grams. */
  heatedGrams: z.number(),
  kinds: z.array(z.enum(KINDS)),
  /** Lots that need steps first, by the steps: what they hold, and what the scheme's own loss would leave of it. */
  afterSteps: z.array(
    z.object({ steps: z.array(z.enum(STEP_KINDS)), grams: z.number(), gives: z.number() }),
  ),
  /** Grams accepted of this polymer, colour and kinds in each of the last full weeks, oldest first. */
  weeks: z.array(z.number()),
});
export type ColourStock = z.output<typeof colourStockSchema>;

export const planStockSchema = z.object({
  colours: z.array(colourStockSchema),
  /** What is left of intake once it has gone through the steps that the method needs, in thousandths; 0 where none lead there. */
  keepsThousandths: z.number(),
  today: z.string(),
});
export type PlanStock = z.output<typeof planStockSchema>;

export const planStockEndpoint = endpoint({
  method: "GET",
  path: "/api/pieces/{pieceId}/stock",
  summary:
    "What the stock has for a piece of one polymer, by colour: free, reserved, after steps, usual intake.",
  permission: "production.read",
  input: z.object({ pieceId: idSchema<"piece">(), polymer: z.enum(HEATABLE) }),
  output: planStockSchema,
});

export const shareSchema = z.object({
  colourCode: z.string().max(40),
  thousandths: z.number().int().min(1).max(1000),
});

export const planDataSchema = z.object({
  pieceId: idSchema<"piece">(),
  polymer: z.enum(HEATABLE),
  toolId: idSchema<"tool">().nullable(),
  machineId: idSchema<"machine">().nullable(),
  wantedPieces: z.number().int("whole-number").min(1, "too-few").max(100_000, "too-large"),
  shares: z
    .array(shareSchema)
    .min(1, "one-at-least")
    .max(MOST_COLOURS, "too_big")
    .refine(
      (shares) => shares.reduce((sum, { thousandths }) => sum + thousandths, 0) === 1000,
      "shares-not-whole",
    )
    .refine(
      (shares) => new Set(shares.map(({ colourCode }) => colourCode)).size === shares.length,
      "colour-twice",
    ),
  folded: z.number().int().min(0).max(100),
  seed: z.number().int().min(0).max(4_294_967_295),
});
export type PlanData = z.output<typeof planDataSchema>;

const runColourSchema = z.object({
  colourCode: z.string(),
  name: z.string(),
  hex: z.string(),
  thousandths: z.number(),
  grams: z.number(),
});

export const runSummarySchema = z.object({
  id: idSchema<"run">(),
  number: z.number(),
  state: z.enum(RUN_STATES),
  pieceName: z.string(),
  method: z.string(),
  polymer: z.enum(HEATABLE),
  wantedPieces: z.number(),
  needGrams: z.number(),
  reservedGrams: z.number(),
  shortGrams: z.number(),
  plannedAt: z.number(),
  colours: z.array(runColourSchema),
  folded: z.number(),
  seed: z.number(),
});
export type RunSummary = z.output<typeof runSummarySchema>;

export const listRunsEndpoint = endpoint({
  method: "GET",
  path: "/api/runs",
  summary: "Runs, newest first.",
  permission: "production.read",
  input: z.object({
    state: z.enum(RUN_STATES).optional(),
    /** Number of the last run of the page before. */
    after: z.coerce.number().int().min(1).optional(),
  }),
  output: z.object({ runs: z.array(runSummarySchema), next: z.number().nullable() }),
});

export const runReceiptSchema = z.object({ id: idSchema<"run">(), number: z.number() });
export type RunReceipt = z.output<typeof runReceiptSchema>;

export const planRunEndpoint = endpoint({
  method: "POST",
  path: "/api/runs",
  summary: "Saves a plan as a run: piece, polymer, tool, machine, blend.",
  permission: "production.plan",
  input: planDataSchema.extend({ requestId: requestIdSchema }),
  output: runReceiptSchema,
});

export const changePlanEndpoint = endpoint({
  method: "PUT",
  path: "/api/runs/{runId}",
  summary: "Changes a plan that has nothing reserved.",
  permission: "production.plan",
  input: planDataSchema.extend({ requestId: requestIdSchema, runId: idSchema<"run">() }),
  output: runReceiptSchema,
});

export const callOffRunEndpoint = endpoint({
  method: "POST",
  path: "/api/runs/{runId}/call-off",
  summary: "Calls a planned run off; what it had reserved is free again.",
  permission: "production.plan",
  input: z.object({ requestId: requestIdSchema, runId: idSchema<"run">() }),
  output: runReceiptSchema,
});
