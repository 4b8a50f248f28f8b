/** The door of next-auth's own routes: an exception to route(), with the same origin check and log line. */
import "server-only";
import NextAuth from "next-auth";
import type { NextRequest } from "next/server";
import { AppError, ERROR_STATUS } from "@/lib/core/errors";
import { authOptions } from "@/lib/identity/auth";
import { settings } from "@/lib/platform/env";
import { log } from "@/lib/platform/logger";
import { isOwnOrigin } from "./origin";
import { problemDocument } from "./problem";
import { anonymousContext, newRequestId } from "./request-context";
import { API_HEADERS, STRICT_TRANSPORT } from "./security-headers";

type Segment = { params: Promise<{ nextauth: string[] }> };
type AuthHandler = (
  request: NextRequest,
  segment: Segment,
  options: ReturnType<typeof authOptions>,
) => Promise<Response>;

/** A form with an address, a password and a token is far smaller. */
const MOST_FORM_BYTES = 16 * 1024;

async function answer(
  request: NextRequest,
  segment: Segment,
  requestId: string,
): Promise<Response> {
  if (request.method !== "GET") {
    const length = request.headers.get("content-length");
    if (length === null || Number(length) > MOST_FORM_BYTES) throw new AppError("too-large");
    if (!isOwnOrigin(request.headers, new URL(settings().publicUrl).origin)) {
      throw new AppError("cross-origin");
    }
  }
  // Its links and cookies follow this variable; the Host header is never asked.
  process.env.NEXTAUTH_URL = settings().publicUrl;
  const ctx = anonymousContext(request.headers, requestId);
  const handle = NextAuth as AuthHandler;
  return handle(request, segment, authOptions(ctx, settings()));
}

/** GET and POST of `/api/auth/*`. */
export async function authRoute(request: NextRequest, segment: Segment): Promise<Response> {
  const started = performance.now();
  const requestId = newRequestId();
  let response: Response;
  try {
    response = await answer(request, segment, requestId);
  } catch (error) {
    const refusal = error instanceof AppError ? error : new AppError("internal", { requestId });
    if (!(error instanceof AppError)) log.error("request-failed", error, { requestId });
    response = Response.json(problemDocument(refusal, requestId), {
      status: ERROR_STATUS[refusal.code],
      headers: { "content-type": "application/problem+json" },
    });
  }
  for (const [name, value] of Object.entries(API_HEADERS)) response.headers.set(name, value);
  if (settings().publicUrl.startsWith("https:")) {
    response.headers.set("strict-transport-security", STRICT_TRANSPORT);
  }
  response.headers.set("x-request-id", requestId);
  log.info("request", {
    requestId,
    method: request.method,
    path: "/api/auth",
    status: response.status,
    ms: Math.round(performance.now() - started),
  });
  return response;
}
