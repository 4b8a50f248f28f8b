/** Coordinators invite people, give them roles and remove them. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { eraseAuditValuesIn, recordAudit } from "@/lib/audit/commands";
import { eraseMailIn, queueMailIn } from "@/lib/mail/commands/queue";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type {
  changeRoleEndpoint,
  invitePersonEndpoint,
  removePersonEndpoint,
  resendInviteEndpoint,
} from "../contract";
import { inviteMail } from "../rules/mails";
import { checkChange } from "../rules/people";
import { insertPersonIn } from "./add-people";
import { endLinksIn, makeLinkIn } from "./links";
import { endSessionsIn } from "./sign-in";

type Person = { id: PersonId; name: string; email: string; role: Role; joined: number };

/** @throws AppError `not-found` for an unknown and for a removed person alike */
function requireLivingPerson(tx: Tx, personId: PersonId): Person {
  const person = prepared(
    tx.client,
    `select id, name, coalesce(email, '') as email, role, joined_at is not null as joined
     from people where id = ? and removed_at is null`,
  ).get(personId) as Person | undefined;
  if (!person) throw new AppError("not-found");
  return person;
}

/** Coordinators who can sign in: an invitation that nobody took up runs no scheme. */
function countCoordinators(tx: Tx): number {
  return prepared(
    tx.client,
    `select count(*) from people
     where role = 'coordinator' and joined_at is not null and removed_at is null`,
  )
    .pluck()
    .get() as number;
}

function requireChangeable(tx: Tx, ctx: Context, person: Person, next: Role | null): void {
  const by = ctx.actor.kind === "person" ? ctx.actor.id : null;
  const target = { ...person, joined: person.joined === 1 };
  const problem = checkChange(target, next, by, countCoordinators(tx));
  if (problem) throw new AppError(problem);
}

function mailInviteIn(tx: Tx, ctx: Context, person: Omit<Person, "joined">): void {
  const link = makeLinkIn(tx, person.id, "invite", ctx.now);
  const text = inviteMail(requireScheme(tx).name, person.name, person.role, link);
  queueMailIn(tx, ctx, { to: person.email, ...text });
}

/**
 * Invites a person by mail; the request id becomes the person's id.
 *
 * @throws AppError `email-in-use`
 */
export function invitePerson(
  ctx: Context,
  input: z.output<typeof invitePersonEndpoint.input>,
): { personId: PersonId } {
  allow(ctx, "people.manage");
  const id = input.requestId as PersonId;
  return once(ctx, "POST /api/people", input.requestId, (tx) => {
    const person = { id, name: input.name, email: input.email, role: input.role };
    insertPersonIn(tx, ctx, { ...person, passwordHash: null });
    mailInviteIn(tx, ctx, person);
    return { personId: id };
  });
}

/**
 * Sends the invitation again with a new link.
 *
 * @throws AppError `not-found`, `joined-already`
 */
export function resendInvite(
  ctx: Context,
  input: z.output<typeof resendInviteEndpoint.input>,
): { personId: PersonId } {
  allow(ctx, "people.manage");
  return once(ctx, `POST /api/people/${input.personId}/invite`, input.requestId, (tx) => {
    const person = requireLivingPerson(tx, input.personId);
    if (person.joined === 1) throw new AppError("joined-already");
    mailInviteIn(tx, ctx, person);
    recordAudit(tx, ctx, {
      action: "people.resend-invite",
      subjectKind: "person",
      subjectId: person.id,
      fields: {},
    });
    return { personId: person.id };
  });
}

/**
 * Gives a person another role, from their next request on.
 *
 * @throws AppError `not-found`, `own-role`, `last-coordinator`
 */
export function changeRole(
  ctx: Context,
  input: z.output<typeof changeRoleEndpoint.input>,
): { personId: PersonId; role: Role } {
  allow(ctx, "people.manage");
  return once(ctx, `PUT /api/people/${input.personId}/role`, input.requestId, (tx) => {
    const person = requireLivingPerson(tx, input.personId);
    requireChangeable(tx, ctx, person, input.role);
    prepared(tx.client, "update people set role = ? where id = ?").run(input.role, person.id);
    recordAudit(tx, ctx, {
      action: "people.change-role",
      subjectKind: "person",
      subjectId: person.id,
      fields: { before: person.role, after: input.role },
    });
    return { personId: person.id, role: input.role };
  });
}

/**
 * Removes a person: sessions and links end at once, the mail address and the password are blanked. The
 * row and its name stay, because tickets name who weighed; the ledger knows the id only.
 *
 * @throws AppError `not-found`, `own-role`, `last-coordinator`
 */
export function removePerson(
  ctx: Context,
  input: z.output<typeof removePersonEndpoint.input>,
): { personId: PersonId; sessionsEnded: number } {
  allow(ctx, "people.manage");
  return once(ctx, `POST /api/people/${input.personId}/removal`, input.requestId, (tx) => {
    const person = requireLivingPerson(tx, input.personId);
    requireChangeable(tx, ctx, person, null);
    prepared(
      tx.client,
      "update people set removed_at = ?, email = null, password_hash = null where id = ?",
    ).run(ctx.now, person.id);
    const sessionsEnded = endSessionsIn(tx, person.id, ctx.now, null);
    endLinksIn(tx, person.id, ctx.now);
    eraseMailIn(tx, person.email);
    eraseAuditValuesIn(tx, "person", person.id);
    recordAudit(tx, ctx, {
      action: "people.remove",
      subjectKind: "person",
      subjectId: person.id,
      fields: { role: person.role, sessionsEnded },
    });
    return { personId: person.id, sessionsEnded };
  });
}
