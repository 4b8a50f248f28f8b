/**
 * The context of one request or one command-line call. It is an argument everywhere: nothing reads an
 * ambient actor or clock.
 */
import type { Db } from "@/db/client";
import type { PersonId, SessionId } from "@/lib/core/ids";
import type { Permission, Role } from "@/lib/core/permissions";
import { mayRole } from "@/lib/core/permissions";
import { AppError } from "@/lib/core/errors";
import type { Instant } from "@/lib/core/time";

export type Actor =
  | { kind: "person"; id: PersonId; role: Role; sessionId: SessionId | null }
  | { kind: "nobody" }
  /** The program itself: jobs, the first set-up. It may do everything. */
  | { kind: "system" };

export type Context = {
  actor: Actor;
  now: Instant;
  /** Of the HTTP request or the job; goes into logs and problem documents. */
  requestId: string;
  /** SHA-256 of the raw body, in hexadecimal; what makes a repeated request the same. */
  bodyHash: string;
  /** The caller's network address, where it may be believed (TRUSTED_PROXY). */
  address: string | null;
  db: Db;
};

/**
 * First line of every command and query.
 *
 * @throws AppError `signed-out` for nobody, `forbidden` for a role without the permission
 */
export function allow(ctx: Context, permission: Permission): void {
  if (ctx.actor.kind === "system") return;
  if (ctx.actor.kind === "nobody") throw new AppError("signed-out");
  if (!mayRole(ctx.actor.role, permission)) throw new AppError("forbidden");
}

/** May the actor, without throwing? For what a page shows. */
export function may(ctx: Context, permission: Permission): boolean {
  return (
    ctx.actor.kind === "system" ||
    (ctx.actor.kind === "person" && mayRole(ctx.actor.role, permission))
  );
}

/** The acting person's id; "system" for the program itself. Never a name. */
export function actorId(ctx: Context): string {
  return ctx.actor.kind === "person" ? ctx.actor.id : ctx.actor.kind;
}

/**
 * The acting person.
 *
 * @throws AppError `signed-out` when nobody in particular acts
 */
export function requirePerson(ctx: Context): PersonId {
  if (ctx.actor.kind !== "person") throw new AppError("signed-out");
  return ctx.actor.id;
}
