/** People and their accounts: what may be asked and what is answered. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { ROLES } from "@/lib/core/permissions";
import { idSchema, instantSchema, lineSchema, requestIdSchema } from "@/lib/core/schemas";
import { MOST_PASSWORD, PERSON_STATES } from "./terms";

/** As typed, made comparable: without blanks around it and in lower case. */
export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254, "too-long")
  .pipe(z.email("not-an-email"));

const roleSchema = z.enum(ROLES);
const personIdSchema = idSchema<"person">();
const tokenSchema = z.string().regex(/^[\w-]{43}$/, "not-an-id");
/** Only the length that a request may carry; the rules for a good password are in rules/password.ts. */
const typedPasswordSchema = z
  .string()
  .min(1, "empty")
  .max(4 * MOST_PASSWORD, "too-long");

export const personSchema = z.object({
  id: personIdSchema,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  state: z.enum(PERSON_STATES),
  invitedAt: instantSchema,
  /** How the latest mail to an invited person stands; null once joined. */
  inviteMail: z.enum(["waiting", "sent", "failed"]).nullable(),
});
export type PersonView = z.output<typeof personSchema>;

export const listPeopleEndpoint = endpoint({
  method: "GET",
  path: "/api/people",
  summary: "Everybody in the scheme, with role and state",
  permission: "people.manage",
  input: z.object({}),
  output: z.object({ people: z.array(personSchema) }),
});

export const inviteInputSchema = z.object({
  requestId: requestIdSchema,
  name: lineSchema(100),
  email: emailSchema,
  role: roleSchema,
});

export const invitePersonEndpoint = endpoint({
  method: "POST",
  path: "/api/people",
  summary: "Invite a person by mail; the request id becomes the person's id",
  permission: "people.manage",
  input: inviteInputSchema,
  output: z.object({ personId: personIdSchema }),
});

const onePersonSchema = z.object({ requestId: requestIdSchema, personId: personIdSchema });

export const resendInviteEndpoint = endpoint({
  method: "POST",
  path: "/api/people/{personId}/invite",
  summary: "Send the invitation again; earlier links stop working",
  permission: "people.manage",
  input: onePersonSchema,
  output: z.object({ personId: personIdSchema }),
});

export const changeRoleEndpoint = endpoint({
  method: "PUT",
  path: "/api/people/{personId}/role",
  summary: "Give a person another role; it counts from their next request",
  permission: "people.manage",
  input: onePersonSchema.extend({ role: roleSchema }),
  output: z.object({ personId: personIdSchema, role: roleSchema }),
});

export const removePersonEndpoint = endpoint({
  method: "POST",
  path: "/api/people/{personId}/removal",
  summary: "Remove a person; their sessions end at once",
  permission: "people.manage",
  input: onePersonSchema,
  output: z.object({ personId: personIdSchema, sessionsEnded: z.number().int() }),
});

export const getAccountEndpoint = endpoint({
  method: "GET",
  path: "/api/account",
  summary: "The signed-in person",
  permission: "account.own",
  input: z.object({}),
  output: z.object({
    personId: personIdSchema,
    name: z.string(),
    email: z.string(),
    role: roleSchema,
  }),
});
export type AccountView = z.output<typeof getAccountEndpoint.output>;

export const changePasswordEndpoint = endpoint({
  method: "POST",
  path: "/api/account/password",
  summary: "Change the own password; every other session ends",
  permission: "account.own",
  input: z.object({
    requestId: requestIdSchema,
    present: typedPasswordSchema,
    password: typedPasswordSchema,
  }),
  output: z.object({ sessionsEnded: z.number().int() }),
});

export const signOutEverywhereEndpoint = endpoint({
  method: "POST",
  path: "/api/account/sign-out-everywhere",
  summary: "End every session of the own account, this one too",
  permission: "account.own",
  input: z.object({ requestId: requestIdSchema }),
  output: z.object({ sessionsEnded: z.number().int() }),
});

export const forgottenPasswordEndpoint = endpoint({
  method: "POST",
  path: "/api/account/forgotten",
  summary:
    "Ask for a link to set a new password; the answer never tells whether the account exists",
  permission: null,
  input: z.object({ requestId: requestIdSchema, email: emailSchema }),
  output: z.object({ accepted: z.literal(true) }),
});

export const setPasswordEndpoint = endpoint({
  method: "POST",
  path: "/api/account/set-password",
  summary: "Set a password with a mailed link's token; it works once and for a day",
  permission: null,
  input: z.object({
    requestId: requestIdSchema,
    token: tokenSchema,
    password: typedPasswordSchema,
  }),
  output: z.object({ done: z.literal(true) }),
});
