/** The OpenAPI 3.1 description, generated from the contracts: what is checked is what is described. */
import * as z from "zod";
import type { Endpoint } from "@/lib/core/endpoint";
import { ENDPOINTS } from "./endpoints";

type Schema = z.core.JSONSchema.BaseSchema;

/** Branded ids and codes are plain strings on the wire; what cannot be described is left open, not dropped. */
function describe(schema: z.ZodType, io: "input" | "output"): Schema {
  const described = z.toJSONSchema(schema, { io, unrepresentable: "any", reused: "inline" });
  delete described.$schema;
  return described;
}

const PROBLEM_SCHEMA = {
  type: "object",
  description:
    "RFC 9457 problem document; `code` is from a closed list, `errors` names refused fields.",
  required: ["type", "title", "status", "detail", "code", "requestId", "values"],
  properties: {
    type: { type: "string" },
    title: { type: "string" },
    status: { type: "integer" },
    detail: { type: "string" },
    code: { type: "string" },
    requestId: { type: "string" },
    values: { type: "object" },
    errors: {
      type: "array",
      items: {
        type: "object",
        required: ["path", "code", "detail"],
        properties: {
          path: { type: "array", items: { type: ["string", "integer"] } },
          code: { type: "string" },
          detail: { type: "string" },
        },
      },
    },
  },
} as const;

const parameterNames = (path: string): string[] =>
  [...path.matchAll(/\{([^}]+)\}/g)].map((match) => match[1] ?? "");

function properties(schema: Schema): Record<string, Schema> {
  return (schema.properties ?? {}) as Record<string, Schema>;
}

function parameters(definition: Endpoint, input: Schema): object[] {
  const inPath = parameterNames(definition.path);
  const required = new Set(input.required ?? []);
  const fields = Object.entries(properties(input));
  const named = Object.fromEntries(fields);
  const pathParameters = inPath.map((name) => ({
    name,
    in: "path",
    required: true,
    schema: named[name] ?? { type: "string" },
  }));
  if (definition.method !== "GET") return pathParameters;
  const query = fields
    .filter(([name]) => !inPath.includes(name))
    .map(([name, schema]) => ({ name, in: "query", required: required.has(name), schema }));
  return [...pathParameters, ...query];
}

/** The body is the input without what stands in the path. */
function bodyOf(definition: Endpoint, input: Schema): Schema {
  const inPath = new Set(parameterNames(definition.path));
  if (inPath.size === 0 || !input.properties) return input;
  const kept = Object.entries(properties(input)).filter(([name]) => !inPath.has(name));
  return {
    ...input,
    properties: Object.fromEntries(kept),
    required: (input.required ?? []).filter((name) => !inPath.has(name)),
  };
}

function operation(definition: Endpoint): object {
  const input = describe(definition.input, "input");
  const success =
    definition.produces && definition.produces !== "application/json"
      ? { [definition.produces]: { schema: { type: "string" } } }
      : { "application/json": { schema: describe(definition.output, "output") } };
  return {
    summary: definition.summary,
    parameters: parameters(definition, input),
    ...(definition.method === "GET"
      ? {}
      : {
          requestBody: {
            required: true,
            content: { "application/json": { schema: bodyOf(definition, input) } },
          },
        }),
    responses: {
      "200": { description: "Done", content: success },
      default: {
        description: "Refused; nothing was saved",
        content: {
          "application/problem+json": { schema: { $ref: "#/components/schemas/Problem" } },
        },
      },
    },
    security: definition.permission === null ? [] : [{ session: [] }],
    "x-permission": definition.permission,
  };
}

/**
 * The whole description.
 *
 * @param server PUBLIC_URL
 * @param cookie name of the session cookie
 */
export function openApiDocument(
  server: string,
  cookie: string,
): { openapi: string; [part: string]: unknown } {
  const paths: Record<string, Record<string, object>> = {};
  for (const definition of ENDPOINTS) {
    const methods = (paths[definition.path] ??= {});
    methods[definition.method.toLowerCase()] = operation(definition);
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Bismar",
      version: "1",
      description:
        "The intake ledger of a community plastic-collection scheme. Masses are whole grams or whole milligrams, as the name of each field says. A write carries a requestId (UUIDv7) made by the client; the same request twice gives the same answer and one effect.",
    },
    servers: [{ url: server }],
    paths,
    components: {
      schemas: { Problem: PROBLEM_SCHEMA },
      securitySchemes: { session: { type: "apiKey", in: "cookie", name: cookie } },
    },
  };
}
