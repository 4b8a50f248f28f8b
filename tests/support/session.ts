/** Sessions made in the database, with the cookie that belongs to them: signing in without the page. */
import { encode } from "next-auth/jwt";
import type { Db } from "@/db/client";
import { newId, type PersonId, type SessionId } from "@/lib/core/ids";
import { sessionCookieName } from "@/lib/identity/terms";
import { DEMO_SECRET } from "@/lib/platform/env";

export type TestSession = { sessionId: SessionId; name: string; value: string; header: string };

const DAY_MS = 24 * 60 * 60 * 1000;

/**
 * Begins a session of a person.
 *
 * @param options.secret NEXTAUTH_SECRET of the server that will read the cookie
 * @param options.secure whether its PUBLIC_URL begins with https
 * @param options.expiresAt epoch milliseconds of the session row
 */
export async function makeSession(
  db: Db,
  personId: PersonId,
  options: { secret?: string; secure?: boolean; expiresAt?: number } = {},
): Promise<TestSession> {
  const sessionId = newId<"session">();
  const createdAt = Date.now();
  db.writer.client
    .prepare("insert into sessions (id, person_id, created_at, expires_at) values (?, ?, ?, ?)")
    .run(sessionId, personId, createdAt, options.expiresAt ?? createdAt + DAY_MS);
  const value = await encode({
    token: { personId, sessionId },
    secret: options.secret ?? DEMO_SECRET,
    maxAge: DAY_MS / 1000,
  });
  const name = sessionCookieName(options.secure ?? false);
  return { sessionId, name, value, header: `${name}=${value}` };
}
