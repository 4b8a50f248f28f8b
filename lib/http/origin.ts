/** Was a write sent by one of our own pages? (OWASP, cross-site request forgery: fetch metadata.) */

/**
 * `Sec-Fetch-Site` decides where the browser sends it; else the Origin must be ours. A request with
 * neither is let through only without a cookie, because then it carries nobody's authority.
 *
 * @param own origin of PUBLIC_URL
 */
export function isOwnOrigin(headers: Headers, own: string): boolean {
  const site = headers.get("sec-fetch-site");
  if (site !== null) return site === "same-origin" || site === "none";
  const origin = headers.get("origin");
  if (origin !== null) return origin === own;
  return !headers.has("cookie");
}
