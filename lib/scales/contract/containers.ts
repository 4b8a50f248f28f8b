/** Containers and sacks: what goes over the wire. Loads are whole milligrams. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import {
  idSchema,
  instantSchema,
  lineSchema,
  milligramsSchema,
  requestIdSchema,
} from "@/lib/core/schemas";
import { TARE_KINDS } from "../terms";
import { loadSchema } from "./scales";

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

export const reweighContainerEndpoint = endpoint({
  method: "POST",
  path: "/api/containers/{containerId}/tares",
  summary:
    "Weigh a container or sack again, empty. It counts from now on; older readings keep the tare of their time.",
  permission: "scales.manage",
  input: z.object({
    requestId: requestIdSchema,
    containerId: idSchema<"container">(),
    scaleId: idSchema<"scale">(),
    /** What the scale shows with the empty container on it. */
    readingMilligrams: loadSchema,
  }),
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
