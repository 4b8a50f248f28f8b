/** Who is signed in, who is in the scheme, and whose a mailed link is. */
import "server-only";
import { createHash } from "node:crypto";
import type { PersonId, SessionId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import type { Instant } from "@/lib/core/time";
import { findMailState } from "@/lib/mail/queries";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { AccountView, PersonView } from "./contract";
import type { LinkPurpose } from "./terms";

const LIVE_SESSION = `
  select p.role
  from sessions s join people p on p.id = s.person_id
  where s.id = ? and s.person_id = ? and s.ended_at is null and s.expires_at > ?
    and p.removed_at is null`;

/**
 * The role of a person whose session is alive, read on every request so that a removal, a changed role
 * or an ended session works at once. It is what authorisation starts from and so asks for none.
 *
 * @returns null when the session has ended or is too old, or the person was removed
 */
export function findSessionRole(
  db: Readable,
  sessionId: SessionId,
  personId: PersonId,
  now: Instant,
): Role | null {
  const row = prepared(db.client, LIVE_SESSION).get(sessionId, personId, now) as
    { role: Role } | undefined;
  return row ? row.role : null;
}

/**
 * The role of a person without a session: for what was begun in one and is finished by the program.
 *
 * @returns null when the person was removed
 */
export function findPersonRole(db: Readable, personId: PersonId): Role | null {
  return (prepared(db.client, "select role from people where id = ? and removed_at is null")
    .pluck()
    .get(personId) ?? null) as Role | null;
}

/** The signed-in person's own account. */
export function getAccount(ctx: Context): AccountView {
  allow(ctx, "account.own");
  return prepared(
    ctx.db.reader.client,
    "select id as personId, name, coalesce(email, '') as email, role from people where id = ?",
  ).get(requirePerson(ctx)) as AccountView;
}

type PersonRow = Omit<PersonView, "state" | "inviteMail"> & { joinedAt: Instant | null };

/** Everybody who was not removed, by name. */
export function listPeople(ctx: Context): { people: PersonView[] } {
  allow(ctx, "people.manage");
  return inSnapshot(ctx, (db) => {
    const rows = prepared(
      db.client,
      `select id, name, coalesce(email, '') as email, role, invited_at as invitedAt, joined_at as joinedAt
       from people where removed_at is null order by name collate nocase, id`,
    ).all() as PersonRow[];
    return {
      people: rows.map(({ joinedAt, ...person }) => ({
        ...person,
        state: joinedAt === null ? ("invited" as const) : ("joined" as const),
        inviteMail: joinedAt === null ? findMailState(db, person.email) : null,
      })),
    };
  });
}

export type LinkPerson = { personId: PersonId; purpose: LinkPurpose; name: string; email: string };

/** What is kept of a link's token. */
export function linkHash(token: string): string {
  return createHash("sha256").update(token).digest("base64url");
}

/** The person of a link that still works, or null. Whoever holds the token may ask. */
export function findLink(db: Readable, token: string, now: Instant): LinkPerson | null {
  return (prepared(
    db.client,
    `select l.person_id as personId, l.purpose, p.name, p.email
     from account_links l join people p on p.id = l.person_id
     where l.token_hash = ? and l.used_at is null and l.expires_at > ? and p.removed_at is null
       and p.email is not null`,
  ).get(linkHash(token), now) ?? null) as LinkPerson | null;
}
