/** Entries leave the catalogue and come back; runs that were planned with them stay as they are. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { idSchema, requestIdSchema } from "@/lib/core/schemas";
import { machineSchema, pieceSchema, toolSchema } from "./catalogue";

const pieceRequest = z.object({ requestId: requestIdSchema, pieceId: idSchema<"piece">() });
export const retirePieceEndpoint = endpoint({
  method: "POST",
  path: "/api/pieces/{pieceId}/retire",
  summary: "Takes a piece out of the catalogue; its runs stay.",
  permission: "production.catalogue",
  input: pieceRequest,
  output: pieceSchema,
});
export const restorePieceEndpoint = endpoint({
  ...retirePieceEndpoint,
  path: "/api/pieces/{pieceId}/restore",
  summary: "Brings a retired piece back.",
});

const toolRequest = z.object({ requestId: requestIdSchema, toolId: idSchema<"tool">() });
export const retireToolEndpoint = endpoint({
  method: "POST",
  path: "/api/tools/{toolId}/retire",
  summary: "Takes a tool out of the list; its runs stay.",
  permission: "production.catalogue",
  input: toolRequest,
  output: toolSchema,
});
export const restoreToolEndpoint = endpoint({
  ...retireToolEndpoint,
  path: "/api/tools/{toolId}/restore",
  summary: "Brings a retired tool back.",
});

const machineRequest = z.object({ requestId: requestIdSchema, machineId: idSchema<"machine">() });
export const retireMachineEndpoint = endpoint({
  method: "POST",
  path: "/api/machines/{machineId}/retire",
  summary: "Takes a machine out of the list; its runs stay.",
  permission: "production.catalogue",
  input: machineRequest,
  output: machineSchema,
});
export const restoreMachineEndpoint = endpoint({
  ...retireMachineEndpoint,
  path: "/api/machines/{machineId}/restore",
  summary: "Brings a retired machine back.",
});
