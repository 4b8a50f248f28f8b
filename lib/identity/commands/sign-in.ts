/** Signing in and out. A wrong password and an unknown account get the same answer in the same time. */
import "server-only";
import { setTimeout as wait } from "node:timers/promises";
import { AppError } from "@/lib/core/errors";
import { newId, type PersonId, type SessionId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { recordAudit } from "@/lib/audit/commands";
import type { Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Tx } from "@/lib/platform/database";
import { normalPassword } from "../rules/password";
import { SESSION_MS } from "../terms";
import { hashPassword, isOutdated, verifyPassword } from "./scrypt";
import {
  clearTriesIn,
  countedKey,
  countGlobalFailure,
  countTryIn,
  forgiveTryIn,
  readGlobalDelay,
} from "./slowing";

export type SignedIn = { personId: PersonId; sessionId: SessionId };

type Account = { id: PersonId; passwordHash: string | null };

/**
 * Checks address and password and begins a session.
 *
 * @param input the address in lower case
 * @throws AppError `wrong-sign-in`, whatever was wrong; `sign-in-slowed` with the seconds to wait
 */
export async function signIn(
  ctx: Context,
  input: { email: string; password: string },
): Promise<SignedIn> {
  const account = countedKey("account", input.email);
  const address = ctx.address === null ? null : countedKey("address", ctx.address);
  const keys = address ? [account, address] : [account];
  inTransaction(ctx, (tx) => countTryIn(tx, ctx, keys));

  const found = prepared(
    ctx.db.reader.client,
    `select id, password_hash as passwordHash from people
     where email = ? and removed_at is null`,
  ).get(input.email) as Account | undefined;
  const delay = readGlobalDelay(ctx);
  if (delay > 0) await wait(delay);
  const password = normalPassword(input.password);
  const right = await verifyPassword(password, found?.passwordHash ?? null);
  if (!found || !right) {
    countGlobalFailure(ctx);
    throw new AppError("wrong-sign-in");
  }

  const stored = found.passwordHash ?? "";
  const renewed = isOutdated(stored) ? await hashPassword(password) : null;
  return inTransaction(ctx, (tx) => {
    // Removed, or the password changed, while the hash was worked out: the same answer as ever.
    if (!isStill(tx, found)) throw new AppError("wrong-sign-in");
    if (renewed) {
      prepared(tx.client, "update people set password_hash = ? where id = ?").run(
        renewed,
        found.id,
      );
    }
    clearTriesIn(tx, account);
    if (address) forgiveTryIn(tx, address);
    const sessionId = beginSessionIn(tx, found.id, ctx.now);
    recordAudit(tx, ctx, {
      action: "identity.sign-in",
      subjectKind: "person",
      subjectId: found.id,
      fields: { session: sessionId },
    });
    return { personId: found.id, sessionId };
  });
}

function isStill(tx: Tx, account: Account): boolean {
  const hash = prepared(
    tx.client,
    "select password_hash from people where id = ? and removed_at is null",
  )
    .pluck()
    .get(account.id) as string | null | undefined;
  return hash !== undefined && hash === account.passwordHash;
}

/** A new session, which ends 30 days after sign-in whatever happens in between. */
export function beginSessionIn(tx: Tx, personId: PersonId, now: Instant): SessionId {
  const sessionId = newId<"session">(now);
  prepared(
    tx.client,
    "insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)",
  ).run(sessionId, personId, now, now + SESSION_MS);
  return sessionId;
}

/**
 * Ends a person's live sessions.
 *
 * @param except the one to keep, null for none
 * @returns how many ended
 */
export function endSessionsIn(
  tx: Tx,
  personId: PersonId,
  now: Instant,
  except: SessionId | null,
): number {
  return prepared(
    tx.client,
    `update sessions set ended_at = ?
     where person_id = ? and ended_at is null and expires_at > ? and id is not ?`,
  ).run(now, personId, now, except).changes;
}

/** Signing out: the session is over for every copy of its cookie. Ending it twice changes nothing. */
export function signOut(ctx: Context, session: SignedIn): void {
  inTransaction(ctx, (tx) => {
    const ended = prepared(
      tx.client,
      "update sessions set ended_at = ? where id = ? and person_id = ? and ended_at is null",
    ).run(ctx.now, session.sessionId, session.personId).changes;
    if (ended === 0) return;
    recordAudit(tx, ctx, {
      action: "identity.sign-out",
      subjectKind: "person",
      subjectId: session.personId,
      fields: { session: session.sessionId },
    });
  });
}
