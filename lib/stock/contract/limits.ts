/** What a coordinator sets for the whole shed: when a lot closes by age, and how much may lie there how long. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { requestIdSchema } from "@/lib/core/schemas";

const limitsSchema = z.object({
  /** A lot closes when it has been open so many weeks; null: never by age. */
  lotWeeks: z.number().int().min(1, "too-few").max(520, "too-large").nullable(),
  /** Most that may lie in the shed, in whole kilograms; null: no limit is set. */
  storageKg: z.number().int().min(1, "too-few").max(1_000_000, "too-large").nullable(),
  /** Longest that anything may lie there, in days; null: no limit is set. */
  storageDays: z.number().int().min(1, "too-few").max(3_650, "too-large").nullable(),
  /** What is reserved for a run is free again after so many days. */
  reservationDays: z.number().int().min(1, "too-few").max(365, "too-large").default(14),
});
export type Limits = z.output<typeof limitsSchema>;

/** How far the limits are used: a warning from 80 %. */
export const storageStandingSchema = z.object({
  heldGrams: z.number().int(),
  oldestDays: z.number().int(),
  limits: limitsSchema,
});
export type StorageStanding = z.output<typeof storageStandingSchema>;

export const getLimitsEndpoint = endpoint({
  method: "GET",
  path: "/api/settings/limits",
  summary: "When a lot closes by age, the shed's storage limits, and how far they are used.",
  permission: "stock.read",
  input: z.object({}),
  output: storageStandingSchema,
});

export const setLimitsSchema = limitsSchema.extend({ requestId: requestIdSchema });
export const setLimitsEndpoint = endpoint({
  method: "PUT",
  path: "/api/settings/limits",
  summary: "Sets when a lot closes by age, and the shed's storage limits.",
  permission: "settings.manage",
  input: setLimitsSchema,
  output: limitsSchema,
});
