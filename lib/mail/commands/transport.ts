/** Where mail goes: a mail server, or a folder on this machine for the demo and development. */
import "server-only";
import fs from "node:fs/promises";
import path from "node:path";
import { createTransport } from "nodemailer";
import type { Settings } from "@/lib/platform/env";

/** A mail as it leaves the outbox. */
export type OutgoingMail = {
  id: number;
  createdAt: number;
  to: string;
  subject: string;
  body: string;
};

export type MailTransport = {
  /** @throws Error when it was not taken; the outbox tries again */
  send(mail: OutgoingMail): Promise<void>;
};

/** A server that hangs must not hold the job's lease: connect, greet, answer. */
const PATIENCE = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000 };

function smtpTransport(url: string, from: string, host: string): MailTransport {
  const transporter = createTransport({ url, ...PATIENCE });
  return {
    async send(mail) {
      await transporter.sendMail({
        from,
        to: { name: "", address: mail.to },
        subject: mail.subject,
        text: mail.body,
        // The same after a crash between sending and noting it, so that a mailbox can tell a double.
        messageId: `<outbox-${mail.id}-${mail.createdAt}@${host}>`,
        disableFileAccess: true,
        disableUrlAccess: true,
      });
    },
  };
}

function folderTransport(folder: string, from: string): MailTransport {
  return {
    async send(mail) {
      await fs.mkdir(folder, { recursive: true, mode: 0o700 });
      const name = path.join(folder, String(mail.id).padStart(8, "0"));
      const { id, to, subject, body } = mail;
      const at = new Date(mail.createdAt).toISOString();
      await fs.writeFile(
        `${name}.txt`,
        `From: ${from}\nTo: ${to}\nDate: ${at}\nSubject: ${subject}\n\n${body}\n`,
        { mode: 0o600 },
      );
      await fs.writeFile(
        `${name}.json`,
        JSON.stringify({ id, at, from, to, subject, body }, null, 2),
        { mode: 0o600 },
      );
    },
  };
}

/** The transport that the settings name. */
export function mailTransport(settings: Pick<Settings, "mail" | "publicUrl">): MailTransport {
  const { mail } = settings;
  return mail.mode === "smtp"
    ? smtpTransport(mail.url, mail.from, new URL(settings.publicUrl).hostname)
    : folderTransport(mail.folder, mail.from);
}
