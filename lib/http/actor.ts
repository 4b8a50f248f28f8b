/**
 * Who sends a request. The cookie says only which session it claims; the database says whether that
 * session is alive and what its person may do, on every request. Only the cookie is read: a token in an
 * Authorization header is never believed.
 */
import "server-only";
import { decode } from "next-auth/jwt";
import type { PersonId, SessionId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { findSessionRole } from "@/lib/identity/queries";
import { sessionCookieName } from "@/lib/identity/terms";
import type { Actor, Context } from "@/lib/platform/context";
import { settings } from "@/lib/platform/env";

export type Caller = {
  actor: Actor;
  /** A session cookie came along, but its session is over. */
  ended: boolean;
};

type Claims = { personId: PersonId; sessionId: SessionId; expiresAt: number };

const NOBODY: Caller = { actor: { kind: "nobody" }, ended: false };
const ENDED: Caller = { actor: { kind: "nobody" }, ended: true };

/**
 * What a cookie decrypts to never changes, so it is worked out once; whether the session lives is asked
 * of the database each time. Only cookies that decrypt are kept, so strangers cannot fill it.
 */
const claimsOf = new Map<string, Claims>();
const MOST_CLAIMS = 2000;

let cookieName: string | undefined;

/** The session cookie's name; its prefix depends on whether people come by https. */
export function ownCookieName(): string {
  cookieName ??= sessionCookieName(settings().publicUrl.startsWith("https:"));
  return cookieName;
}

/** One cookie's value out of a Cookie header, or null. */
export function readCookie(header: string | null, name: string): string | null {
  if (!header) return null;
  let at = header.indexOf(`${name}=`);
  while (at > 0 && header[at - 1] !== " " && header[at - 1] !== ";") {
    at = header.indexOf(`${name}=`, at + 1);
  }
  if (at < 0) return null;
  const from = at + name.length + 1;
  const until = header.indexOf(";", from);
  return header.slice(from, until < 0 ? undefined : until).trim() || null;
}

async function readClaims(token: string): Promise<Claims | null> {
  try {
    const claims = await decode({ token, secret: settings().secret });
    if (!claims || typeof claims.personId !== "string" || typeof claims.sessionId !== "string") {
      return null;
    }
    return {
      personId: claims.personId,
      sessionId: claims.sessionId,
      expiresAt: Number(claims.exp ?? 0) * 1000,
    };
  } catch {
    // Not made by us, made with another secret, or too old: the same as no session.
    return null;
  }
}

/**
 * The caller behind a session cookie.
 *
 * @param token the cookie's value, null when there was none
 */
export async function readCaller(
  token: string | null,
  db: Context["db"],
  now: Instant,
): Promise<Caller> {
  if (!token) return NOBODY;
  let claims = claimsOf.get(token);
  if (!claims) {
    const read = await readClaims(token);
    if (!read) return ENDED;
    claims = read;
    if (claimsOf.size >= MOST_CLAIMS) claimsOf.clear();
    claimsOf.set(token, claims);
  }
  if (claims.expiresAt <= now) return ENDED;
  const role = findSessionRole(db.reader, claims.sessionId, claims.personId, now);
  if (!role) return ENDED;
  return {
    actor: { kind: "person", id: claims.personId, role, sessionId: claims.sessionId },
    ended: false,
  };
}

/**
 * The caller's address, where it may be believed: the n-th from the right of X-Forwarded-For when n
 * proxies of our own stand in front (TRUSTED_PROXY). Everything to the left of it is the caller's say.
 *
 * @returns null when no proxy is trusted or the header is too short
 */
export function readAddress(forwardedFor: string | null, trustedProxies: number): string | null {
  if (trustedProxies === 0 || !forwardedFor) return null;
  return forwardedFor.split(",").at(-trustedProxies)?.trim() || null;
}
