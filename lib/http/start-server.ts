/** What happens once when the server starts: settings are checked, jobs begin. */
import "server-only";
import { tidyIdentity } from "@/lib/identity/commands/tidy";
import { verifyNow } from "@/lib/ledger/commands/verify";
import { deliverDueMail, isMailDue } from "@/lib/mail/commands/deliver";
import { mailTransport } from "@/lib/mail/commands/transport";
import { now } from "@/lib/platform/clock";
import { database } from "@/lib/platform/database";
import { settings, SettingsError, type Settings } from "@/lib/platform/env";
import { repeat, underLease } from "@/lib/platform/jobs";
import { log } from "@/lib/platform/logger";

const SECOND = 1000;
const MINUTE = 60 * SECOND;
const HOUR = 60 * MINUTE;

/** Five mails, each up to 40 seconds with a server that hangs, and some to spare. */
const MAIL_LEASE_MS = 5 * MINUTE;

function startMail(found: Settings): void {
  const transport = mailTransport(found);
  // The folder is for people who sit in front of it and wait.
  const every = found.mail.mode === "folder" ? SECOND : 5 * SECOND;
  repeat("mail", every, async () => {
    const db = database();
    if (!isMailDue(db, now())) return;
    await underLease(db, "mail", MAIL_LEASE_MS, now, async () => {
      const { sent, failed } = await deliverDueMail(db, transport, now);
      if (sent + failed > 0) log.info("mail", { sent, failed });
      return `sent ${sent}, failed ${failed}`;
    });
  });
}

function startTidying(): void {
  repeat("tidy", HOUR, async () => {
    const db = database();
    await underLease(db, "tidy-identity", MINUTE, now, () =>
      Promise.resolve(`dropped ${tidyIdentity(db, now())}`),
    );
  });
}

/** The whole ledger, soon after the start and then once a day; in a thread, so no request waits for it. */
function startVerifying(): void {
  const verify = async (): Promise<void> => {
    await verifyNow(database(), null);
  };
  setTimeout(() => {
    verify().catch((error: unknown) => log.error("job-failed", error, { job: "ledger-verify" }));
  }, 10 * SECOND).unref();
  repeat("ledger-verify", 24 * HOUR, verify);
}

/**
 * Ends the process when the settings are wrong: a server that runs with a wrong secret, or with mail
 * that reaches nobody, is worse than none. The message names the variable.
 */
export function startServer(): void {
  let found: Settings;
  try {
    found = settings();
  } catch (error) {
    if (!(error instanceof SettingsError)) throw error;
    process.stderr.write(`Bismar does not start. ${error.message}\n`);
    process.exit(1);
  }
  startMail(found);
  startTidying();
  if (found.mode === "production" || found.mode === "demo") startVerifying();
  log.info("started", { mode: found.mode, mail: found.mail.mode });
}
