/** Promising lots to a run, giving them back, prolonging. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { idSchema, requestIdSchema } from "@/lib/core/schemas";

const runRequest = z.object({ requestId: requestIdSchema, runId: idSchema<"run">() });

export const reservedSchema = z.object({
  number: z.number(),
  /** What this request promised, lot by lot. */
  picks: z.array(z.object({ number: z.number(), grams: z.number() })),
  grams: z.number(),
  /** What no lot had free. */
  uncovered: z.array(z.object({ colourCode: z.string(), grams: z.number() })),
});
export type Reserved = z.output<typeof reservedSchema>;

export const reserveEndpoint = endpoint({
  method: "POST",
  path: "/api/runs/{runId}/reservations",
  summary:
    "Promises stock to a run: what its blend still lacks, oldest lots first, or grams of lots chosen by hand. Never more than is free.",
  permission: "production.plan",
  input: runRequest.extend({
    /** By hand; left out: oldest first. */
    lots: z
      .array(
        z.object({
          number: z.number().int().min(1).max(1_000_000_000),
          grams: z.number().int().min(1, "too-few").max(100_000_000, "too-large"),
        }),
      )
      .min(1)
      .max(50, "too_big")
      .optional(),
  }),
  output: reservedSchema,
});

export const releaseEndpoint = endpoint({
  method: "POST",
  path: "/api/runs/{runId}/release",
  summary: "Gives back what a run had reserved: of one lot, or all of it.",
  permission: "production.plan",
  input: runRequest.extend({ reservationId: idSchema<"reservation">().optional() }),
  output: z.object({ number: z.number(), releasedGrams: z.number() }),
});

export const prolongEndpoint = endpoint({
  method: "POST",
  path: "/api/runs/{runId}/prolong",
  summary: "Lets what a run has reserved stand for the scheme's days from now on.",
  permission: "production.plan",
  input: runRequest,
  output: z.object({ number: z.number(), lapsesAt: z.number() }),
});
