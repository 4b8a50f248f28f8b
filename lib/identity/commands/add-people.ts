/** Adding a person's row: by invitation, at the first set-up, and for the demo. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { newId, type PersonId } from "@/lib/core/ids";
import type { Role } from "@/lib/core/permissions";
import { recordAudit } from "@/lib/audit/commands";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import { emailSchema } from "../contract";
import { makeLinkIn } from "./links";

export type NewPerson = { name: string; email: string; role: Role };

/**
 * Adds the row and its audit row.
 *
 * @param person with the address in lower case; passwordHash null until a link sets one
 * @throws AppError `email-in-use`
 */
export function insertPersonIn(
  tx: Tx,
  ctx: Context,
  person: NewPerson & { id: PersonId; passwordHash: string | null },
): void {
  const taken = prepared(tx.client, "select 1 from people where email = ?").get(person.email);
  if (taken) throw new AppError("email-in-use", {}, ["email"]);
  prepared(
    tx.client,
    `insert into people (id, name, email, role, password_hash, invited_at, joined_at)
     values (?, ?, ?, ?, ?, ?, ?)`,
  ).run(
    person.id,
    person.name,
    person.email,
    person.role,
    person.passwordHash,
    ctx.now,
    person.passwordHash === null ? null : ctx.now,
  );
  recordAudit(tx, ctx, {
    action: "people.invite",
    subjectKind: "person",
    subjectId: person.id,
    fields: { role: person.role },
    personal: { name: person.name, email: person.email },
  });
}

/**
 * A person who can sign in at once: for seeding a demo.
 *
 * @param passwordHash made by hashPassword (commands/scrypt.ts), before the transaction
 * @throws AppError `email-in-use`
 */
export function addPersonIn(
  tx: Tx,
  ctx: Context,
  person: NewPerson & { passwordHash: string; id?: PersonId },
): PersonId {
  allow(ctx, "people.manage");
  const id = person.id ?? newId<"person">(ctx.now);
  insertPersonIn(tx, ctx, { ...person, id, email: emailSchema.parse(person.email) });
  return id;
}

/**
 * The scheme's first coordinator, made at the command line: nobody is there yet to invite them, and mail
 * may not run yet, so the link is shown instead of mailed.
 *
 * @returns the link to set a password with
 * @throws AppError `email-in-use`
 */
export function setUpPeopleIn(
  tx: Tx,
  ctx: Context,
  first: { name: string; email: string },
): { personId: PersonId; link: string } {
  allow(ctx, "people.manage");
  const id = newId<"person">(ctx.now);
  const email = emailSchema.parse(first.email);
  insertPersonIn(tx, ctx, { id, name: first.name, email, role: "coordinator", passwordHash: null });
  return { personId: id, link: makeLinkIn(tx, id, "invite", ctx.now) };
}
