/**
 * The door of the storage's protocol: an exception to route(), with the same origin check, permission, limit
 * and log line. Two kinds of request come here: a page that wants to send a picture, and the storage itself.
 */
import "server-only";
import { AppError, ERROR_STATUS, type ErrorDetail } from "@/lib/core/errors";
import { allow, type Context } from "@/lib/platform/context";
import { settings } from "@/lib/platform/env";
import { log } from "@/lib/platform/logger";
import { readBody } from "./body";
import { handleByKit, type KitRefusal } from "./file-router";
import { isOwnOrigin } from "./origin";
import { asAppError, problemDocument, retryAfter } from "./problem";
import { anonymousContext, identify, newRequestId } from "./request-context";
import { API_HEADERS, STRICT_TRANSPORT } from "./security-headers";

const HOOK = "uploadthing-hook";
/** What one file's name, size and subject need is far smaller. */
const MOST_BODY_BYTES = 64 * 1024;

/** Permission comes before the body is read, as everywhere. */
async function admit(request: Request, ctx: Context): Promise<void> {
  if (!isOwnOrigin(request.headers, new URL(settings().publicUrl).origin)) {
    throw new AppError("cross-origin");
  }
  const ended = await identify(ctx, request.headers);
  if (ctx.actor.kind === "nobody") throw new AppError(ended ? "session-ended" : "signed-out");
  allow(ctx, "photos.add");
}

/** The kit answers what it cannot read with an empty body; so it is read here first. */
async function readJsonText(request: Request): Promise<Buffer> {
  const bytes = await readBody(request, MOST_BODY_BYTES);
  try {
    JSON.parse(bytes.toString("utf8"));
  } catch {
    throw new AppError("malformed-json");
  }
  return bytes;
}

async function refusalOf(answer: Response): Promise<AppError> {
  try {
    const { code, values } = (await answer.json()) as Partial<KitRefusal>;
    if (code && Object.hasOwn(ERROR_STATUS, code)) return new AppError(code, values);
  } catch {
    // An empty body: something in the request was not even of the protocol.
  }
  return new AppError(answer.status < 500 ? "invalid" : "internal");
}

async function answer(request: Request, ctx: Context): Promise<Response> {
  const fromStorage = request.headers.has(HOOK);
  let forKit = request;
  if (request.method === "POST") {
    if (!fromStorage) await admit(request, ctx);
    const { url, method, headers } = request;
    const body = new Uint8Array(await readJsonText(request));
    forKit = new Request(url, { method, headers, body });
  }
  const answered = await handleByKit(forKit, fromStorage ? null : ctx);
  if (answered.status >= 400) throw await refusalOf(answered);
  return answered;
}

function refuse(error: unknown, requestId: string): Response {
  const refusal = asAppError(error, requestId);
  const detail: ErrorDetail =
    refusal.code === "internal" ? { ...refusal.detail, requestId } : refusal.detail;
  const document = problemDocument(new AppError(refusal.code, detail, refusal.path), requestId);
  if (document.status >= 500) log.error("request-failed", error, { requestId });
  const headers: Record<string, string> = { "content-type": "application/problem+json" };
  const wait = retryAfter(refusal.code, detail);
  if (wait) headers["retry-after"] = wait;
  return new Response(JSON.stringify(document), { status: document.status, headers });
}

/** GET and POST of `/api/uploadthing`. */
export async function uploadRoute(request: Request): Promise<Response> {
  const started = performance.now();
  const requestId = newRequestId();
  const ctx = anonymousContext(request.headers, requestId);
  const response = await answer(request, ctx).catch((error: unknown) => refuse(error, requestId));
  const headers = new Headers(response.headers);
  for (const [name, value] of Object.entries(API_HEADERS)) headers.set(name, value);
  if (settings().publicUrl.startsWith("https:")) {
    headers.set("strict-transport-security", STRICT_TRANSPORT);
  }
  headers.set("x-request-id", requestId);
  log.info("request", {
    requestId,
    method: request.method,
    path: "/api/uploadthing",
    hook: request.headers.get(HOOK)?.slice(0, 20),
    status: response.status,
    ms: Math.round((performance.now() - started) * 100) / 100,
    person: ctx.actor.kind === "person" ? ctx.actor.id : null,
  });
  return new Response(response.body, { status: response.status, headers });
}
