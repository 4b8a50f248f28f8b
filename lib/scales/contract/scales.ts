/** Scales: what goes over the wire. Loads are whole milligrams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  idSchema,
  instantSchema,
  lineSchema,
  milligramsSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { SCALE_CLASSES } from "../terms";

/** A load that is there at all. */
export const loadSchema = milligramsSchema.min(1, "empty");

const scaleFields = {
  name: lineSchema(60),
  maxMilligrams: loadSchema,
  dMilligrams: loadSchema,
};

/** A verified scale has e, another one the accuracy that its maker states. */
export const scaleDataSchema = z.discriminatedUnion("class", [
  z.object({ ...scaleFields, class: z.enum(["III", "IIII"]), eMilligrams: loadSchema }),
  z.object({ ...scaleFields, class: z.literal("none"), statedAccuracyMilligrams: loadSchema }),
]);
export type ScaleData = z.output<typeof scaleDataSchema>;

export const scaleSchema = z.object({
  id: idSchema<"scale">(),
  /** The number under which the ledger knows it. */
  number: z.number().int(),
  name: z.string(),
  class: z.enum(SCALE_CLASSES),
  maxMilligrams: milligramsSchema,
  eMilligrams: milligramsSchema.nullable(),
  dMilligrams: milligramsSchema,
  statedAccuracyMilligrams: milligramsSchema.nullable(),
  retiredAt: instantSchema.nullable(),
});
export type ScaleReceipt = z.output<typeof scaleSchema>;

export const addScaleSchema = z.intersection(
  z.object({ requestId: requestIdSchema }),
  scaleDataSchema,
);
export const addScaleEndpoint = endpoint({
  method: "POST",
  path: "/api/scales",
  summary: "Add a scale. Its id is the request's.",
  permission: "scales.manage",
  input: addScaleSchema,
  output: scaleSchema,
});

export const changeScaleSchema = z.intersection(
  z.object({ requestId: requestIdSchema, scaleId: idSchema<"scale">() }),
  scaleDataSchema,
);
export const changeScaleEndpoint = endpoint({
  method: "PUT",
  path: "/api/scales/{scaleId}",
  summary: "Change a scale's data. Readings already saved keep the error they were saved with.",
  permission: "scales.manage",
  input: changeScaleSchema,
  output: scaleSchema,
});

export const retireScaleSchema = z.object({
  requestId: requestIdSchema,
  scaleId: idSchema<"scale">(),
});
export const retireScaleEndpoint = endpoint({
  method: "POST",
  path: "/api/scales/{scaleId}/retire",
  summary: "Take a scale out of the lists.",
  permission: "scales.manage",
  input: retireScaleSchema,
  output: scaleSchema,
});
export const restoreScaleEndpoint = endpoint({
  method: "POST",
  path: "/api/scales/{scaleId}/restore",
  summary: "Bring a retired scale back.",
  permission: "scales.manage",
  input: retireScaleSchema,
  output: scaleSchema,
});

export const listScalesSchema = z.object({});
export const listScalesEndpoint = endpoint({
  method: "GET",
  path: "/api/scales",
  summary: "Scales in use, by number.",
  permission: "scales.read",
  input: listScalesSchema,
  output: z.object({ items: z.array(scaleSchema) }),
});
