/** The job that empties the outbox. It runs under a lease, so that no mail goes out twice. */
import "server-only";
import { instant, type Instant } from "@/lib/core/time";
import { inTransaction, prepared } from "@/lib/platform/database";
import type { Context } from "@/lib/platform/context";
import { log } from "@/lib/platform/logger";
import { nextAttempt } from "../rules";
import type { MailTransport } from "./transport";

type Waiting = {
  id: number;
  to: string;
  subject: string;
  body: string;
  createdAt: Instant;
  attempts: number;
};

/** Few enough that a mail server that hangs on each of them stays within the lease. */
const MOST_AT_ONCE = 5;

/** Is anything due? Asked of the reader before the lease is taken, which is a write. */
export function isMailDue(db: Context["db"], now: Instant): boolean {
  return (
    prepared(
      db.reader.client,
      "select 1 from outbox where sent_at is null and next_attempt_at <= ? limit 1",
    ).get(now) !== undefined
  );
}

/** What a mail server said, short enough to keep and without what was sent. */
function reason(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).slice(0, 200);
}

/**
 * Sends what is due. A mail that goes out loses its body at once; one that does not is tried later, and
 * after a day given up (sent_at stays empty, next_attempt_at lies out of reach, the body is gone).
 *
 * @returns how many went out and how many did not
 */
export async function deliverDueMail(
  db: Context["db"],
  transport: MailTransport,
  clock: () => Instant,
): Promise<{ sent: number; failed: number }> {
  const due = prepared(
    db.reader.client,
    `select id, to_address as "to", subject, body, created_at as createdAt, attempts from outbox
     where sent_at is null and next_attempt_at <= ? order by next_attempt_at, id limit ?`,
  ).all(clock(), MOST_AT_ONCE) as Waiting[];
  let sent = 0;
  for (const mail of due) {
    try {
      await transport.send(mail);
    } catch (error) {
      noteFailure(db, mail, reason(error), clock());
      continue;
    }
    sent += 1;
    inTransaction({ db }, (tx) =>
      prepared(
        tx.client,
        "update outbox set sent_at = ?, body = '', attempts = attempts + 1, last_error = null where id = ?",
      ).run(clock(), mail.id),
    );
  }
  return { sent, failed: due.length - sent };
}

/** Out of reach of any clock: given up. */
const NEVER = instant(8_640_000_000_000);

function noteFailure(db: Context["db"], mail: Waiting, message: string, now: Instant): void {
  const next = nextAttempt(mail.attempts + 1, mail.createdAt, now);
  log.warn("mail-not-sent", {
    mail: mail.id,
    attempts: mail.attempts + 1,
    reason: message,
    givenUp: next === null,
  });
  inTransaction({ db }, (tx) =>
    prepared(
      tx.client,
      `update outbox set attempts = attempts + 1, last_error = ?, next_attempt_at = ?,
         body = case when ? then '' else body end
       where id = ?`,
    ).run(message, next ?? NEVER, next === null ? 1 : 0, mail.id),
  );
}
