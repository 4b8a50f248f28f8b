/**
 * Before every page: a fresh nonce and the page's security headers. It decides nothing about who may see
 * what; commands and queries do.
 */
import { randomBytes, randomUUID } from "node:crypto";
import { NextResponse, type NextRequest } from "next/server";
import { NONCE_HEADER, PATH_HEADER, REQUEST_ID_HEADER } from "@/lib/http/page-headers";
import { contentSecurityPolicy, PAGE_HEADERS, STRICT_TRANSPORT } from "@/lib/http/security-headers";
import { settings } from "@/lib/platform/env";

export function proxy(request: NextRequest): NextResponse {
  const nonce = randomBytes(18).toString("base64");
  const requestId = randomUUID();
  const { publicUrl, storage } = settings();
  const policy = contentSecurityPolicy(
    nonce,
    process.env.NODE_ENV === "development",
    storage.browserSource,
  );

  const forwarded = new Headers(request.headers);
  // Next puts the nonce on its own scripts when the request carries the policy.
  forwarded.set("content-security-policy", policy);
  forwarded.set(NONCE_HEADER, nonce);
  forwarded.set(REQUEST_ID_HEADER, requestId);
  forwarded.set(PATH_HEADER, request.nextUrl.pathname + request.nextUrl.search);

  const response = NextResponse.next({ request: { headers: forwarded } });
  response.headers.set("content-security-policy", policy);
  response.headers.set(REQUEST_ID_HEADER, requestId);
  for (const [name, value] of Object.entries(PAGE_HEADERS)) response.headers.set(name, value);
  if (publicUrl.startsWith("https:")) {
    response.headers.set("strict-transport-security", STRICT_TRANSPORT);
  }
  return response;
}

export const config = {
  // API answers set their own headers in route(); a proxy in front of them would copy every body. The scanner's
  // worker has its own policy (next.config.mjs), which a page's would replace.
  matcher: ["/((?!api/|_next/static|_next/image|scanner/).*)"],
};
