/** Check weights, checks of a scale and a lead's word on it: what goes over the wire. Loads are whole milligrams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  daySchema,
  idSchema,
  instantSchema,
  lineSchema,
  milligramsSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { SCALE_DAY_STATES, SCALES_TODAY_ADDRESS } from "../terms";
import { loadSchema } from "./scales";

export const checkWeightSchema = z.object({
  id: idSchema<"check-weight">(),
  name: z.string(),
  massMilligrams: milligramsSchema,
  /** Number of its certificate, or where and when it was weighed. */
  evidence: z.string(),
  retiredAt: instantSchema.nullable(),
});
export type CheckWeight = z.output<typeof checkWeightSchema>;

export const addCheckWeightEndpoint = endpoint({
  method: "POST",
  path: "/api/check-weights",
  summary: "Add a check weight: any object whose mass is known. Its id is the request's.",
  permission: "scales.manage",
  input: z.object({
    requestId: requestIdSchema,
    name: lineSchema(60),
    massMilligrams: loadSchema,
    evidence: lineSchema(200),
  }),
  output: checkWeightSchema,
});

const retireInput = z.object({
  requestId: requestIdSchema,
  checkWeightId: idSchema<"check-weight">(),
});
export const retireCheckWeightEndpoint = endpoint({
  method: "POST",
  path: "/api/check-weights/{checkWeightId}/retire",
  summary: "Take a check weight out of the list; its checks stay.",
  permission: "scales.manage",
  input: retireInput,
  output: checkWeightSchema,
});
export const restoreCheckWeightEndpoint = endpoint({
  method: "POST",
  path: "/api/check-weights/{checkWeightId}/restore",
  summary: "Bring a retired check weight back.",
  permission: "scales.manage",
  input: retireInput,
  output: checkWeightSchema,
});

export const listCheckWeightsEndpoint = endpoint({
  method: "GET",
  path: "/api/check-weights",
  summary: "Check weights in use, by name.",
  permission: "scales.read",
  input: z.object({}),
  output: z.object({ items: z.array(checkWeightSchema) }),
});

export const checkScaleEndpoint = endpoint({
  method: "POST",
  path: "/api/scales/{scaleId}/checks",
  summary: "A check weight on a scale, judged by the in-service limit of its class at that load.",
  permission: "scales.check",
  input: z.object({
    /** Made by the client; the id of the check. */
    requestId: requestIdSchema,
    scaleId: idSchema<"scale">(),
    checkWeightId: idSchema<"check-weight">(),
    readingMilligrams: milligramsSchema,
  }),
  output: z.object({
    checkId: z.string(),
    attempt: z.number().int(),
    errorMilligrams: z.number().int(),
    limitMilligrams: z.number().int(),
    passed: z.boolean(),
    /** How the scale stands today, this check included. */
    state: z.enum(SCALE_DAY_STATES),
  }),
});
export type CheckReceipt = z.output<(typeof checkScaleEndpoint)["output"]>;

export const clearScaleEndpoint = endpoint({
  method: "POST",
  path: "/api/scales/{scaleId}/clearances",
  summary: "Clear a scale for a day on which its check failed or was left out.",
  permission: "scales.clear",
  input: z.object({
    requestId: requestIdSchema,
    scaleId: idSchema<"scale">(),
    day: daySchema,
    note: lineSchema(300),
  }),
  output: z.object({ scaleId: z.string(), day: z.string(), state: z.enum(SCALE_DAY_STATES) }),
});

export const scalesTodayEndpoint = endpoint({
  ...SCALES_TODAY_ADDRESS,
  summary: "How each scale in use stands today, by number.",
  permission: "scales.read",
  input: z.object({}),
  output: z.object({
    day: z.string(),
    items: z.array(
      z.object({
        scaleId: idSchema<"scale">(),
        name: z.string(),
        state: z.enum(SCALE_DAY_STATES),
      }),
    ),
  }),
});
export type ScaleToday = z.output<(typeof scalesTodayEndpoint)["output"]>["items"][number];
