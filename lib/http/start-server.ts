/** What happens once when the server starts: settings are checked, jobs begin. */
import "server-only";
import { randomUUID } from "node:crypto";
import { tidyIdentity } from "@/lib/identity/commands/tidy";
import { verifyNow } from "@/lib/ledger/commands/verify";
import { deliverDueMail, isMailDue } from "@/lib/mail/commands/deliver";
import { mailTransport } from "@/lib/mail/commands/transport";
import { now } from "@/lib/platform/clock";
import type { Context } from "@/lib/platform/context";
import { database } from "@/lib/platform/database";
import { settings, type Settings } from "@/lib/platform/env";
import { repeat, underLease } from "@/lib/platform/jobs";
import { log } from "@/lib/platform/logger";
import { SettingsError } from "@/lib/platform/settings-error";
import { storage } from "@/lib/platform/storage";
import { tendReservations } from "@/lib/production/commands/lapse";
import { closeOldLots } from "@/lib/stock/commands/close-lot";
import { tidyPhotos } from "@/lib/uploads/commands/tidy";

const SECOND = 1000;
const MINUTE = 60 * SECOND;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

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

/** Once a day, the first time an hour after the start; when the storage does not answer, again in an hour. */
function startTidyingPhotos(): void {
  let due = 0;
  repeat("tidy-photos", HOUR, async () => {
    const db = database();
    if (now() < due) return;
    await underLease(db, "tidy-photos", HOUR, now, async () => {
      const done = await tidyPhotos(systemContext(db), storage());
      log.info("photos-tidied", done);
      return JSON.stringify(done);
    });
    due = now() + DAY - MINUTE;
  });
}

/** Lots that have been open for the scheme's set weeks; who asks for one earlier finds it closed as well. */
function startClosingOldLots(): void {
  repeat("close-old-lots", HOUR, async () => {
    const db = database();
    await underLease(db, "close-old-lots", MINUTE, now, () => {
      const closed = closeOldLots(systemContext(db));
      return Promise.resolve(`closed ${closed}`);
    });
  });
}

/** Reservations: a mail before they lapse and when they turn short, and the lapse itself. */
function startTendingReservations(): void {
  repeat("reservations", 5 * MINUTE, async () => {
    const db = database();
    await underLease(db, "reservations", MINUTE, now, () => {
      const done = tendReservations(systemContext(db));
      return Promise.resolve(JSON.stringify(done));
    });
  });
}

/** The program itself acts. */
function systemContext(db: Context["db"]): Context {
  return {
    actor: { kind: "system" },
    now: now(),
    requestId: randomUUID(),
    bodyHash: "",
    address: null,
    db,
  };
}

/** The whole ledger, soon after the start and then once a day; in a thread, so no request waits for it. */
function startVerifying(): void {
  const verify = async (): Promise<void> => {
    await verifyNow(database(), null);
  };
  setTimeout(() => {
    verify().catch((error: unknown) => log.error("job-failed", error, { job: "ledger-verify" }));
  }, 10 * SECOND).unref();
  repeat("ledger-verify", DAY, verify);
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
  startTidyingPhotos();
  startClosingOldLots();
  startTendingReservations();
  if (found.mode === "production" || found.mode === "demo") startVerifying();
  log.info("started", {
    mode: found.mode,
    mail: found.mail.mode,
    storage: found.storage.mode,
  });
}
