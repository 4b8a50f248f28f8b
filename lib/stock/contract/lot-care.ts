/** What is done to a lot without moving mass: closing it, saying which container it lies in, finding it by its label. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { codeSchema, idSchema, requestIdSchema } from "@/lib/core/schemas";
import { LOT_ENDS } from "../terms";
import { lotNumberSchema } from "./weighed";

export const closeLotEndpoint = endpoint({
  method: "POST",
  path: "/api/lots/{number}/close",
  summary:
    "Close a lot: its container is full, or nothing more shall go in. The next one opens by itself.",
  permission: "stock.edit",
  input: z.object({
    requestId: requestIdSchema,
    number: lotNumberSchema,
    reason: z.enum(["full", "by-hand"]),
  }),
  output: z.object({
    number: z.number().int(),
    closedAt: z.number().int(),
    closedFor: z.enum(LOT_ENDS),
  }),
});

export const setLotContainerEndpoint = endpoint({
  method: "PUT",
  path: "/api/lots/{number}/container",
  summary:
    "Say in which listed container a lot lies; its empty weight is then taken off when it is counted.",
  permission: "stock.edit",
  input: z.object({
    requestId: requestIdSchema,
    number: lotNumberSchema,
    containerId: idSchema<"container">().nullable(),
  }),
  output: z.object({
    number: z.number().int(),
    containerId: idSchema<"container">().nullable(),
    containerName: z.string().nullable(),
  }),
});

export const lotByLabelEndpoint = endpoint({
  method: "GET",
  path: "/api/lots/by-label/{code}",
  summary: "The lot that a scanned label is on.",
  permission: "stock.read",
  input: z.object({ code: codeSchema }),
  output: z.object({
    number: z.number().int(),
    containerId: idSchema<"container">().nullable(),
    heldGrams: z.number().int(),
  }),
});
