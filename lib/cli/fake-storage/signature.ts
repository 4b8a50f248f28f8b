/**
 * The service's signatures: HMAC-SHA256 with the key of the token, over a whole address up to its signature or
 * over a body. Compared without telling by the time it took.
 */
import { createHmac, timingSafeEqual } from "node:crypto";

const PREFIX = "hmac-sha256=";

/** "hmac-sha256=" and 64 hexadecimal figures. */
export function sign(text: string, key: string): string {
  return PREFIX + createHmac("sha256", key).update(text).digest("hex");
}

/** Are two secrets the same? Its time depends on their lengths alone. */
export function isSame(given: string, wanted: string): boolean {
  const [one, other] = [Buffer.from(given), Buffer.from(wanted)];
  return one.length === other.length && timingSafeEqual(one, other);
}

export type SignedAddress =
  | { ok: true; parameters: ReadonlyMap<string, string> }
  | { ok: false; status: 401 | 403; reason: string };

/** The kit encodes each value once more than a query string needs. */
function decodeTwice(value: string): string {
  try {
    return decodeURIComponent(value);
  } catch {
    return value;
  }
}

/**
 * Checks a signed address: signature first, then whether it has run out, so that nothing is learned of an
 * address that was made up.
 *
 * @param origin the storage's own, as it was set; what a request calls its host is never asked
 * @param target path and query string of the request, as they came
 * @param now epoch milliseconds
 */
export function readSigned(
  origin: string,
  target: string,
  key: string,
  now: number,
): SignedAddress {
  const at = target.lastIndexOf("&signature=");
  if (at < 0) return { ok: false, status: 401, reason: "not signed" };
  const signed = target.slice(0, at);
  const given = decodeTwice(target.slice(at + "&signature=".length));
  if (!isSame(given, sign(origin + signed, key))) {
    return { ok: false, status: 401, reason: "wrong signature" };
  }
  const query = new URLSearchParams(signed.slice(signed.indexOf("?") + 1));
  const parameters = new Map([...query].map(([name, value]) => [name, decodeTwice(value)]));
  const expires = Number(parameters.get("expires"));
  if (!Number.isFinite(expires) || expires <= now) {
    return { ok: false, status: 403, reason: "expired" };
  }
  return { ok: true, parameters };
}
