/** What can be asked of the ledger over HTTP: is it right, and where does it stand. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { instantSchema, requestIdSchema } from "@/lib/core/schemas";

export const verificationSchema = z.object({
  ok: z.boolean(),
  /** The first bad entry; null when all are good, or when a stored figure differs from its lines. */
  badEntry: z.number().int().nullable(),
  problem: z.string().nullable(),
  entries: z.number().int(),
  lines: z.number().int(),
  headEntry: z.number().int(),
  headHash: z.string(),
  milliseconds: z.number().int(),
});
export type Verification = z.output<typeof verificationSchema>;

/** The last verification that came to an end; at is null when there has been none. */
export const lastVerificationSchema = z.object({
  at: instantSchema.nullable(),
  result: verificationSchema.nullable(),
});
export type LastVerification = z.output<typeof lastVerificationSchema>;

export const lastVerificationEndpoint = endpoint({
  method: "GET",
  path: "/api/ledger/verifications",
  summary: "The last verification of the ledger",
  permission: "ledger.verify",
  input: z.object({}),
  output: lastVerificationSchema,
});

/** A head noted outside the database, with which the chain must still agree. */
export const verifySchema = z.object({
  requestId: requestIdSchema,
  entryId: z.number().int().min(1).nullable().default(null),
  hash: z
    .string()
    .trim()
    .regex(/^[0-9a-f]{64}$/i, "not-a-hash")
    .nullable()
    .default(null),
});

export const verifyEndpoint = endpoint({
  method: "POST",
  path: "/api/ledger/verifications",
  summary: "Verify the whole ledger now",
  permission: "ledger.verify",
  input: verifySchema,
  output: lastVerificationSchema,
});
