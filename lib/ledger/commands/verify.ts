/** Verifying in a worker thread: at start, nightly and on demand. The last result is kept with the job. */
import "server-only";
import type * as z from "zod";
import { recordAudit } from "@/lib/audit/commands";
import { AppError } from "@/lib/core/errors";
import type { Instant } from "@/lib/core/time";
import { now } from "@/lib/platform/clock";
import { allow, type Context } from "@/lib/platform/context";
import { inTransaction } from "@/lib/platform/database";
import { underLease } from "@/lib/platform/jobs";
import { log } from "@/lib/platform/logger";
import { startWorker } from "@/lib/platform/worker";
import type { LastVerification, verifySchema } from "../contract";
import type { ExpectedHead, VerifyResult } from "../queries/verify";
import { VERIFY_JOB } from "../terms";

const LONGEST_MS = 15 * 60 * 1000;

export type VerifyJob = { databaseFile: string; expected: ExpectedHead | null };

function inWorker(job: VerifyJob): Promise<VerifyResult> {
  return new Promise((resolve, reject) => {
    const worker = startWorker("verify-worker", job);
    worker.once("message", (result: VerifyResult) => {
      resolve(result);
      void worker.terminate();
    });
    worker.once("error", reject);
    worker.once("exit", (code) => reject(new Error(`the verifier left with code ${code}`)));
  });
}

/**
 * Verifies the ledger once, under a lease, and keeps the result.
 *
 * @returns null when another verification is under way
 */
export async function verifyNow(
  db: Context["db"],
  expected: ExpectedHead | null,
): Promise<VerifyResult | null> {
  let found: VerifyResult | null = null;
  await underLease(db, VERIFY_JOB, LONGEST_MS, now, async () => {
    found = await inWorker({ databaseFile: db.file, expected });
    if (!found.ok) {
      log.error("ledger-bad", new Error(found.problem ?? ""), { entry: found.badEntry });
    }
    return JSON.stringify(found);
  });
  return found;
}

/**
 * A coordinator's verification on demand.
 *
 * @throws AppError `verify-under-way` when one is running
 */
export async function requestVerification(
  ctx: Context,
  input: z.output<typeof verifySchema>,
): Promise<LastVerification> {
  allow(ctx, "ledger.verify");
  const expected =
    input.entryId !== null && input.hash !== null
      ? { entryId: input.entryId, hash: input.hash.toLowerCase() }
      : null;
  const result = await verifyNow(ctx.db, expected);
  if (!result) throw new AppError("verify-under-way");
  inTransaction(ctx, (tx) =>
    recordAudit(tx, ctx, {
      action: "ledger.verify",
      subjectKind: "ledger",
      subjectId: String(result.headEntry),
      fields: { ok: result.ok ? 1 : 0, badEntry: result.badEntry },
    }),
  );
  return { at: now() satisfies Instant, result };
}
