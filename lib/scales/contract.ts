/** Scales, containers and sacks: what goes over the wire. Loads are whole milligrams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  idSchema,
  instantSchema,
  lineSchema,
  milligramsSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { SCALE_CLASSES, TARE_KINDS } from "./terms";

const loadSchema = milligramsSchema.min(1, "empty");

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

export const containerSchema = z.object({
  id: idSchema<"container">(),
  kind: z.enum(TARE_KINDS),
  name: z.string(),
  tareMilligrams: milligramsSchema,
  /** Scanning this code sets the tare; null for a sack. */
  labelCode: z.string().nullable(),
  retiredAt: instantSchema.nullable(),
});
export type ContainerReceipt = z.output<typeof containerSchema>;

export const addContainerSchema = z.object({
  requestId: requestIdSchema,
  kind: z.enum(TARE_KINDS),
  name: lineSchema(60),
  tareMilligrams: loadSchema,
});
export const addContainerEndpoint = endpoint({
  method: "POST",
  path: "/api/containers",
  summary: "Add a container or a sack with its empty weight. Its id is the request's.",
  permission: "scales.manage",
  input: addContainerSchema,
  output: containerSchema,
});

export const changeContainerSchema = addContainerSchema
  .omit({ kind: true })
  .extend({ containerId: idSchema<"container">() });
export const changeContainerEndpoint = endpoint({
  method: "PATCH",
  path: "/api/containers/{containerId}",
  summary:
    "Change a container's or sack's name or empty weight. Saved weigh-ins keep the old tare.",
  permission: "scales.manage",
  input: changeContainerSchema,
  output: containerSchema,
});

export const retireContainerSchema = z.object({
  requestId: requestIdSchema,
  containerId: idSchema<"container">(),
});
export const retireContainerEndpoint = endpoint({
  method: "POST",
  path: "/api/containers/{containerId}/retire",
  summary: "Take a container or sack out of the lists.",
  permission: "scales.manage",
  input: retireContainerSchema,
  output: containerSchema,
});
export const restoreContainerEndpoint = endpoint({
  method: "POST",
  path: "/api/containers/{containerId}/restore",
  summary: "Bring a retired container or sack back.",
  permission: "scales.manage",
  input: retireContainerSchema,
  output: containerSchema,
});

export const listContainersSchema = z.object({});
export const listContainersEndpoint = endpoint({
  method: "GET",
  path: "/api/containers",
  summary: "Containers and sacks in use, by name.",
  permission: "scales.read",
  input: listContainersSchema,
  output: z.object({ items: z.array(containerSchema) }),
});
