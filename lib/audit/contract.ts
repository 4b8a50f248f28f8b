/** Searching the audit: who did what to which record, when, and what changed. */
import * as z from "zod";
import { endpoint } from "@/lib/core/endpoint";
import { daySchema, idSchema } from "@/lib/core/schemas";

export const auditRowSchema = z.object({
  id: z.number().int(),
  at: z.number().int(),
  /** null: the program itself, or somebody signed out. */
  actor: z.object({ id: z.string(), name: z.string() }).nullable(),
  /** "weighing.correct" */
  action: z.string(),
  subjectKind: z.string(),
  subjectId: z.string(),
  /** Field names with values that name nobody. */
  fields: z.record(z.string(), z.union([z.string(), z.number(), z.boolean(), z.null()])),
  /** Names, addresses and free text, which erasing a person empties: null is erased. */
  personal: z.array(z.object({ field: z.string(), value: z.string().nullable() })),
  /** The ledger's act, where there is one. */
  actId: z.number().int().nullable(),
});
export type AuditRow = z.output<typeof auditRowSchema>;

export const searchAuditSchema = z.object({
  /** First part of the action: "weighing". */
  area: z.string().max(40).optional(),
  actor: idSchema<"person">().optional(),
  /** Days in the scheme's zone, both included. */
  from: daySchema.optional(),
  to: daySchema.optional(),
  /** Part of an action, of a record's id, or of what was written. */
  text: z.string().trim().max(80).optional(),
  /** Id of the last row of the page before. */
  before: z
    .string()
    .regex(/^\d{1,15}$/, "not-a-number")
    .optional(),
});
export type SearchAudit = z.output<typeof searchAuditSchema>;

export const searchAuditEndpoint = endpoint({
  method: "GET",
  path: "/api/audit",
  summary: "Actions on people, points, settings, lots and entries, newest first, in pages.",
  permission: "audit.read",
  input: searchAuditSchema,
  output: z.object({ rows: z.array(auditRowSchema), next: z.string().nullable() }),
});
