/**
 * The door of every handler: session, permission, origin, body, contract, command, answer, log line.
 * Permission comes before the body is read, so that nobody learns from a refusal what would be valid.
 */
import "server-only";
import { hash } from "node:crypto";
import type * as z from "zod";
import type { Endpoint } from "@/lib/core/endpoint";
import { AppError } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { settings } from "@/lib/platform/env";
import { log } from "@/lib/platform/logger";
import { readBody } from "./body";
import { isOwnOrigin } from "./origin";
import { asAppError, InvalidInput, problemDocument, retryAfter } from "./problem";
import { anonymousContext, identify, newRequestId } from "./request-context";
import { API_HEADERS, STRICT_TRANSPORT } from "./security-headers";

type PathParameters = Readonly<Record<string, string | string[] | undefined>>;
type Segment = { params: Promise<PathParameters> };

/** What a route.ts exports; it names its endpoint, so that a test can compare file and contract. */
export type RouteHandler = ((request: Request, segment: Segment) => Promise<Response>) & {
  readonly endpoint: Endpoint;
};

const MOST_BODY_BYTES = 256 * 1024;

type Fixed = { origin: string; headers: Readonly<Record<string, string>> };
let fixed: Fixed | undefined;

/** What is the same in every answer, worked out once the settings can be read. */
function fixedParts(): Fixed {
  if (!fixed) {
    const { origin, protocol } = new URL(settings().publicUrl);
    fixed = {
      origin,
      headers:
        protocol === "https:"
          ? { ...API_HEADERS, "strict-transport-security": STRICT_TRANSPORT }
          : API_HEADERS,
    };
  }
  return fixed;
}

/** Query string as an object: a name that comes twice becomes a list. */
function readQuery(url: string): Record<string, string | string[]> {
  const at = url.indexOf("?");
  const query: Record<string, string | string[]> = {};
  if (at < 0) return query;
  for (const [name, value] of new URLSearchParams(url.slice(at + 1))) {
    const known = Object.hasOwn(query, name) ? query[name] : undefined;
    query[name] =
      known === undefined ? value : [...(Array.isArray(known) ? known : [known]), value];
  }
  return query;
}

async function readJson(request: Request, ctx: Context): Promise<object> {
  if (!/^application\/json\b/i.test(request.headers.get("content-type") ?? "")) {
    throw new AppError("not-json");
  }
  const bytes = await readBody(request, MOST_BODY_BYTES);
  ctx.bodyHash = hash("sha256", bytes, "hex");
  let body: unknown;
  try {
    body = JSON.parse(bytes.toString("utf8"));
  } catch {
    throw new AppError("malformed-json");
  }
  // Path parameters are merged into it, so it must be an object before the contract sees it.
  if (typeof body !== "object" || body === null || Array.isArray(body)) {
    throw new AppError("malformed-json");
  }
  return body;
}

/** Everything before the command: who, whether, and with what. */
async function admit<Input extends z.ZodType>(
  definition: Endpoint<Input>,
  request: Request,
  segment: Segment,
  ctx: Context,
): Promise<z.output<Input>> {
  const { method, permission } = definition;
  if (method !== "GET" && !isOwnOrigin(request.headers, fixedParts().origin)) {
    throw new AppError("cross-origin");
  }
  const ended = await identify(ctx, request.headers);
  if (permission !== null) {
    if (ctx.actor.kind === "nobody") throw new AppError(ended ? "session-ended" : "signed-out");
    allow(ctx, permission);
  }
  const sent = method === "GET" ? readQuery(request.url) : await readJson(request, ctx);
  const parsed = definition.input.safeParse(
    definition.path.includes("{") ? { ...sent, ...(await segment.params) } : sent,
  );
  if (!parsed.success) throw new InvalidInput(parsed.error.issues);
  return parsed.data;
}

function refuse(error: unknown, ctx: Context | null, requestId: string, path: string): Response {
  const refusal = asAppError(error, requestId);
  const document = problemDocument(refusal, requestId);
  if (document.status >= 500) log.error("request-failed", error, { requestId, path });
  const headers: Record<string, string> = {
    ...fixedParts().headers,
    "content-type": "application/problem+json",
    "x-request-id": requestId,
  };
  const wait = retryAfter(refusal.code, refusal.detail);
  if (wait) headers["retry-after"] = wait;
  return new Response(JSON.stringify(document), { status: document.status, headers });
}

function serve<Input extends z.ZodType>(
  definition: Endpoint<Input>,
  answer: (ctx: Context, input: z.output<Input>, request: Request) => Response | Promise<Response>,
): RouteHandler {
  const { method, path } = definition;
  const handler = async (request: Request, segment: Segment): Promise<Response> => {
    const started = performance.now();
    const requestId = newRequestId();
    let ctx: Context | null = null;
    let response: Response;
    try {
      ctx = anonymousContext(request.headers, requestId);
      response = await answer(ctx, await admit(definition, request, segment, ctx), request);
    } catch (error) {
      response = refuse(error, ctx, requestId, path);
    }
    log.info("request", {
      requestId,
      method,
      path,
      status: response.status,
      ms: Math.round((performance.now() - started) * 100) / 100,
      person: ctx?.actor.kind === "person" ? ctx.actor.id : null,
    });
    return response;
  };
  return Object.assign(handler, { endpoint: definition });
}

/**
 * A handler that answers JSON: `export const POST = route(weighInEndpoint, weighBag)`.
 *
 * Input is the JSON body (writes) or the query string (GET), with path parameters laid over it, through
 * the contract's schema. The answer is the command's own type and is not parsed again; tests do that.
 */
export function route<Input extends z.ZodType, Output extends z.ZodType>(
  definition: Endpoint<Input, Output>,
  handle: (ctx: Context, input: z.output<Input>) => z.output<Output> | Promise<z.output<Output>>,
): RouteHandler {
  return serve<Input>(definition, async (ctx, input) => {
    const answer = await handle(ctx, input);
    return new Response(JSON.stringify(answer), {
      headers: {
        ...fixedParts().headers,
        "content-type": definition.produces ?? "application/json",
        "x-request-id": ctx.requestId,
      },
    });
  });
}

/**
 * A handler that makes its own response, such as a streamed CSV. The program's headers are added to it.
 * The request's `signal` tells when the reader has gone.
 */
export function streamRoute<Input extends z.ZodType, Output extends z.ZodType>(
  definition: Endpoint<Input, Output>,
  handle: (ctx: Context, input: z.output<Input>, request: Request) => Response | Promise<Response>,
): RouteHandler {
  return serve<Input>(definition, async (ctx, input, request) => {
    const response = await handle(ctx, input, request);
    for (const [name, value] of Object.entries(fixedParts().headers)) {
      if (!response.headers.has(name)) response.headers.set(name, value);
    }
    response.headers.set("x-request-id", ctx.requestId);
    return response;
  });
}
