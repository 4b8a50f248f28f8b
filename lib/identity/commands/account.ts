/** A person's own account: forgotten, set and changed passwords, and ending every session. */
import "server-only";
import { createHmac } from "node:crypto";
import { setTimeout as wait } from "node:timers/promises";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { PersonId } from "@/lib/core/ids";
import { recordAudit } from "@/lib/audit/commands";
import { queueMailIn } from "@/lib/mail/commands/queue";
import { allow, requirePerson, type Context } from "@/lib/platform/context";
import { inTransaction, prepared, type Tx } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { once } from "@/lib/platform/receipts";
import { requireScheme } from "@/lib/platform/scheme";
import type {
  changePasswordEndpoint,
  forgottenPasswordEndpoint,
  setPasswordEndpoint,
  signOutEverywhereEndpoint,
} from "../contract";
import { findLink } from "../queries";
import { passwordChangedMail, resetMail } from "../rules/mails";
import { checkPassword, normalPassword, type PasswordVerdict } from "../rules/password";
import { LEAST_PASSWORD, MOST_PASSWORD } from "../terms";
import { endLinksIn, makeLinkIn, useLinkIn } from "./links";
import { hashPassword, verifyPassword } from "./scrypt";
import { endSessionsIn } from "./sign-in";
import { clearTriesIn, countedKey, countTryIn } from "./slowing";

/** Both answers of a forgotten password take this long, so that time does not tell them apart. */
const FORGOTTEN_MS = 250;

/**
 * Mails a link to set a new password, if the account exists; the answer never tells.
 *
 * No receipt is kept: anybody may ask, and asking twice mails twice at most three times an hour.
 *
 * @throws AppError `sign-in-slowed` after three in an hour for one address, existing or not
 */
export async function requestPasswordReset(
  ctx: Context,
  input: z.output<typeof forgottenPasswordEndpoint.input>,
): Promise<{ accepted: true }> {
  const answered = wait(FORGOTTEN_MS);
  const keys = [countedKey("forgotten", input.email)];
  if (ctx.address !== null) keys.push(countedKey("forgottenAddress", ctx.address));
  inTransaction(ctx, (tx) => {
    countTryIn(tx, ctx, keys);
    const person = prepared(
      tx.client,
      "select id, name from people where email = ? and removed_at is null",
    ).get(input.email) as { id: PersonId; name: string } | undefined;
    if (!person) return;
    const link = makeLinkIn(tx, person.id, "reset", ctx.now);
    const text = resetMail(requireScheme(tx).name, person.name, link);
    queueMailIn(tx, ctx, { to: input.email, ...text });
    recordAudit(tx, ctx, {
      action: "identity.ask-reset",
      subjectKind: "person",
      subjectId: person.id,
      fields: {},
    });
  });
  await answered;
  return { accepted: true };
}

/**
 * Receipts keep a hash of the body for good, and these bodies hold passwords: it is keyed with the
 * program's secret, so that the database alone is no help in guessing them.
 */
function sealed(ctx: Context): Context {
  const bodyHash = createHmac("sha256", settings().secret).update(ctx.bodyHash).digest("hex");
  return { ...ctx, bodyHash };
}

function requireGood(verdict: PasswordVerdict): string {
  if (verdict.ok) return verdict.password;
  throw new AppError(verdict.problem, { least: LEAST_PASSWORD, most: MOST_PASSWORD }, ["password"]);
}

function storePasswordIn(tx: Tx, ctx: Context, personId: PersonId, passwordHash: string): void {
  prepared(
    tx.client,
    "update people set password_hash = ?, joined_at = coalesce(joined_at, ?) where id = ?",
  ).run(passwordHash, ctx.now, personId);
  endLinksIn(tx, personId, ctx.now);
}

/**
 * Sets a password with a mailed link's token. Sessions that were open end: whoever forgot a password may
 * have lost a phone too.
 *
 * @throws AppError `link-expired`, `password-too-short`, `password-too-long`, `password-too-common`
 */
export async function setPassword(
  ctx: Context,
  input: z.output<typeof setPasswordEndpoint.input>,
): Promise<{ done: true }> {
  // Judged and hashed before the transaction, and only for a link that works: hashing is dear.
  const link = findLink(ctx.db.reader, input.token, ctx.now);
  const verdict = link && checkPassword(input.password, ownWords(link));
  const passwordHash = verdict?.ok ? await hashPassword(verdict.password) : null;
  return once(sealed(ctx), "POST /api/account/set-password", input.requestId, (tx) => {
    if (verdict) requireGood(verdict);
    const { personId, purpose, email } = useLinkIn(tx, input.token, ctx.now);
    if (passwordHash === null) throw new AppError("link-expired");
    storePasswordIn(tx, ctx, personId, passwordHash);
    clearTriesIn(tx, countedKey("account", email));
    const sessionsEnded = endSessionsIn(tx, personId, ctx.now, null);
    recordAudit(tx, ctx, {
      action: "identity.set-password",
      subjectKind: "person",
      subjectId: personId,
      fields: { purpose, sessionsEnded },
    });
    // Nothing personal: the receipt is kept for good.
    return { done: true as const };
  });
}

function ownWords(person: { name: string; email: string }): string[] {
  return [person.name, ...person.name.split(/\s+/), person.email, person.email.split("@")[0] ?? ""];
}

type Own = { name: string; email: string; passwordHash: string | null };

/**
 * Changes the own password; every other session ends, and the person is told by mail.
 *
 * @throws AppError `password-wrong`, `sign-in-slowed`, or what is wrong with the new password
 */
export async function changePassword(
  ctx: Context,
  input: z.output<typeof changePasswordEndpoint.input>,
): Promise<{ sessionsEnded: number }> {
  allow(ctx, "account.own");
  const personId = requirePerson(ctx);
  const own = prepared(
    ctx.db.reader.client,
    "select name, coalesce(email, '') as email, password_hash as passwordHash from people where id = ?",
  ).get(personId) as Own;
  const account = countedKey("account", own.email);
  inTransaction(ctx, (tx) => countTryIn(tx, ctx, [account]));
  const right = await verifyPassword(normalPassword(input.present), own.passwordHash);
  const verdict = checkPassword(input.password, ownWords(own));
  const passwordHash = right && verdict.ok ? await hashPassword(verdict.password) : null;
  return once(sealed(ctx), "POST /api/account/password", input.requestId, (tx) => {
    // After the look-up of the receipt: the same request again must not be told that it is wrong now.
    if (!right) throw new AppError("password-wrong", {}, ["present"]);
    requireGood(verdict);
    if (passwordHash === null) throw new AppError("password-wrong", {}, ["present"]);
    storePasswordIn(tx, ctx, personId, passwordHash);
    clearTriesIn(tx, account);
    const keep = ctx.actor.kind === "person" ? ctx.actor.sessionId : null;
    const sessionsEnded = endSessionsIn(tx, personId, ctx.now, keep);
    const forgotten = `${settings().publicUrl}/forgotten`;
    const text = passwordChangedMail(requireScheme(tx).name, own.name, forgotten);
    queueMailIn(tx, ctx, { to: own.email, ...text });
    recordAudit(tx, ctx, {
      action: "identity.change-password",
      subjectKind: "person",
      subjectId: personId,
      fields: { sessionsEnded },
    });
    return { sessionsEnded };
  });
}

/** Ends every session of the own account, the present one too. */
export function signOutEverywhere(
  ctx: Context,
  input: z.output<typeof signOutEverywhereEndpoint.input>,
): { sessionsEnded: number } {
  allow(ctx, "account.own");
  const personId = requirePerson(ctx);
  return once(ctx, "POST /api/account/sign-out-everywhere", input.requestId, (tx) => {
    const sessionsEnded = endSessionsIn(tx, personId, ctx.now, null);
    recordAudit(tx, ctx, {
      action: "identity.sign-out-everywhere",
      subjectKind: "person",
      subjectId: personId,
      fields: { sessionsEnded },
    });
    return { sessionsEnded };
  });
}
