/** Jobs that run beside requests: a timer in this process, and a lease so that one process does the work. */
import "server-only";
import { randomUUID } from "node:crypto";
import type { Instant } from "@/lib/core/time";
import type { Context } from "./context";
import { inTransaction, prepared } from "./database";
import { log } from "./logger";

const HOLDER = randomUUID();

/**
 * Runs a job if nobody else holds its lease, and gives the lease back after it. A process that dies keeps
 * the lease until it runs out.
 *
 * @param leaseMs longer than the work can take
 * @param holder who asks; one name for each process
 * @returns false when another process holds the lease
 */
export async function underLease(
  db: Context["db"],
  name: string,
  leaseMs: number,
  clock: () => Instant,
  work: () => Promise<string>,
  holder: string = HOLDER,
): Promise<boolean> {
  const taken = inTransaction({ db }, (tx) => {
    const now = clock();
    return prepared(
      tx.client,
      `insert into job_leases (name, holder, until) values (?, ?, ?)
       on conflict (name) do update set holder = excluded.holder, until = excluded.until
       where job_leases.until <= ?`,
    ).run(name, holder, now + leaseMs, now).changes;
  });
  if (taken === 0) return false;
  let result = "failed";
  try {
    result = await work();
  } finally {
    inTransaction({ db }, (tx) => {
      const now = clock();
      // Only one's own lease: after an overrun it may be another's by now.
      prepared(
        tx.client,
        `update job_leases set until = ?, last_finished_at = ?, last_result = ?
         where name = ? and holder = ?`,
      ).run(now, now, result.slice(0, 2000), name, holder);
    });
  }
  return true;
}

/**
 * Calls a job again and again, the next pause starting when it has ended. A failure is logged and the
 * timer goes on; it never keeps the process alive.
 *
 * @returns what stops it
 */
export function repeat(name: string, everyMs: number, work: () => Promise<void>): () => void {
  let timer: NodeJS.Timeout | undefined;
  let stopped = false;
  const plan = (): void => {
    if (stopped) return;
    timer = setTimeout(() => void run(), everyMs);
    timer.unref();
  };
  const run = async (): Promise<void> => {
    try {
      await work();
    } catch (error) {
      log.error("job-failed", error, { job: name });
    }
    plan();
  };
  plan();
  return () => {
    stopped = true;
    clearTimeout(timer);
  };
}
