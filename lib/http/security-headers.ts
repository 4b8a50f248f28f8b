/** Headers that make the browser stricter, for pages (with a nonce) and for API answers. */

/** For everything that is answered. */
export const COMMON_HEADERS = {
  "x-content-type-options": "nosniff",
  "referrer-policy": "same-origin",
  "cross-origin-resource-policy": "same-origin",
} as const;

/** A year, as browsers' preload lists ask for; only over https, where it means something. */
export const STRICT_TRANSPORT = "max-age=31536000; includeSubDomains";

/** An API answer is data: nothing in it may run, and nothing may keep it. */
export const API_HEADERS = {
  ...COMMON_HEADERS,
  "cache-control": "no-store",
  "content-security-policy": "default-src 'none'; frame-ancestors 'none'",
} as const;

export const PAGE_HEADERS = {
  ...COMMON_HEADERS,
  "permissions-policy": "camera=(self), microphone=(), geolocation=(), payment=(), usb=()",
  "cross-origin-opener-policy": "same-origin",
  "x-frame-options": "DENY",
} as const;

/**
 * The policy of a page. Scripts run by nonce and by what they load themselves; WebAssembly is left to the
 * scanner's worker, whose own answer allows it. Inline style attributes are allowed because widths and
 * colours of data are set that way.
 *
 * @param nonce fresh for each answer
 * @param development the dev server evaluates code and reloads through a socket
 * @param storage where a page sends its pictures to, as a source of connect-src
 */
export function contentSecurityPolicy(
  nonce: string,
  development: boolean,
  storage: string,
): string {
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' blob: data:",
    "media-src 'self' blob:",
    "font-src 'self'",
    `connect-src 'self' ${storage}${development ? " ws: wss:" : ""}`,
    "worker-src 'self'",
    "manifest-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
}
