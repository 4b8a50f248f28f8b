/** The last verification that came to an end; reports name it and warn when it failed. */
import "server-only";
import type { Instant } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { prepared, type Readable } from "@/lib/platform/database";
import { verificationSchema, type LastVerification } from "../contract";
import { VERIFY_JOB } from "../terms";

export function lastVerification(db: Readable): LastVerification {
  const job = prepared(
    db.client,
    "select last_finished_at as at, last_result as result from job_leases where name = ?",
  ).get(VERIFY_JOB) as { at: Instant | null; result: string | null } | undefined;
  if (!job?.at || !job.result) return { at: null, result: null };
  let stored: unknown;
  try {
    stored = JSON.parse(job.result);
  } catch {
    // The job failed before it had a result; it says so in words instead of JSON.
    return { at: job.at, result: null };
  }
  return { at: job.at, result: verificationSchema.safeParse(stored).data ?? null };
}

export function getLastVerification(ctx: Context): LastVerification {
  allow(ctx, "ledger.verify");
  return lastVerification(ctx.db.reader);
}
