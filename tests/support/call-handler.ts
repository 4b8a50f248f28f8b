/** Calls a handler in this process, as the server would, on a test's own database. */
import type { Db } from "@/db/client";
import type { RouteHandler } from "@/lib/http/route";
import { settings } from "@/lib/platform/env";

/** Makes handlers use this database until the next call; the test closes it. */
export function serveFrom(db: Db): void {
  (globalThis as unknown as { bismarDb?: Db }).bismarDb = db;
}

export type Call = {
  method?: string;
  path?: string;
  params?: Record<string, string>;
  /** A string is sent as it is; anything else as JSON. */
  body?: unknown;
  cookie?: string;
  headers?: Record<string, string>;
};

/** A write comes from an own page unless its headers say otherwise. */
export function callHandler(handler: RouteHandler, call: Call = {}): Promise<Response> {
  const method = call.method ?? handler.endpoint.method;
  const isWrite = method !== "GET";
  const headers = new Headers({
    ...(isWrite ? { "content-type": "application/json", "sec-fetch-site": "same-origin" } : {}),
    ...(call.cookie ? { cookie: call.cookie } : {}),
    ...call.headers,
  });
  const body = typeof call.body === "string" ? call.body : JSON.stringify(call.body ?? {});
  const request = new Request(`${settings().publicUrl}${call.path ?? handler.endpoint.path}`, {
    method,
    headers,
    ...(isWrite ? { body } : {}),
  });
  return handler(request, { params: Promise.resolve(call.params ?? {}) });
}
