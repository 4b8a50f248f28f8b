/** The context of one HTTP request, before its body is read. */
import "server-only";
import { randomUUID } from "node:crypto";
import type { Actor, Context } from "@/lib/platform/context";
import { now } from "@/lib/platform/clock";
import { database } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { ownCookieName, readAddress, readCaller, readCookie } from "./actor";

/** What request headers offer here; Headers of the web and of Next alike. */
type HeaderReader = { get(name: string): string | null };

const NOBODY: Actor = { kind: "nobody" };

/** A request's number: made here, never taken from the client, so that a log line has one owner. */
export function newRequestId(): string {
  return randomUUID();
}

/** A context in which nobody acts yet. */
export function anonymousContext(headers: HeaderReader, requestId: string): Context {
  const trusted = settings().trustedProxies;
  return {
    actor: NOBODY,
    now: now(),
    requestId,
    bodyHash: "",
    address: trusted === 0 ? null : readAddress(headers.get("x-forwarded-for"), trusted),
    db: database(),
  };
}

/**
 * Puts the caller behind the session cookie into the context.
 *
 * @returns true when a cookie came whose session is over
 */
export async function identify(ctx: Context, headers: HeaderReader): Promise<boolean> {
  const token = readCookie(headers.get("cookie"), ownCookieName());
  if (!token) return false;
  const caller = await readCaller(token, ctx.db, ctx.now);
  ctx.actor = caller.actor;
  return caller.ended;
}
