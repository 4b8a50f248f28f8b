/** Endpoints about the program itself, which belong to no area. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";

export const healthEndpoint = endpoint({
  method: "GET",
  path: "/api/health",
  summary: "Whether the database answers, and which ledger head it stands at; 503 when it does not",
  permission: null,
  input: z.object({}),
  output: z.object({
    status: z.literal("ok"),
    /** Entry 0 and an empty hash while the ledger is empty. */
    ledger: z.object({ entryId: z.number().int(), hash: z.string() }),
  }),
});

export const openApiEndpoint = endpoint({
  method: "GET",
  path: "/api/openapi.json",
  summary: "This description",
  permission: null,
  input: z.object({}),
  output: z.looseObject({ openapi: z.string() }),
});
