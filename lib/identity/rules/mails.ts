/** What the mails about accounts say. A link's mail names the scheme, what happens and how long it works. */
import type { Role } from "@/lib/core/permissions";
import { ROLE_NAMES } from "../terms";

type MailText = { subject: string; body: string };

const lines = (...parts: string[]): string => parts.join("\n");

export function inviteMail(scheme: string, name: string, role: Role, link: string): MailText {
  return {
    subject: `${scheme}: you are invited`,
    body: lines(
      `Dear ${name},`,
      "",
      `you are invited to ${scheme} as ${ROLE_NAMES[role].toLowerCase()}. Choose a password here:`,
      "",
      link,
      "",
      "The link works once and for a day. If it is too old, ask a coordinator for a new one.",
      "If you did not expect this, do nothing; without a password there is no account.",
    ),
  };
}

export function resetMail(scheme: string, name: string, link: string): MailText {
  return {
    subject: `${scheme}: set a new password`,
    body: lines(
      `Dear ${name},`,
      "",
      `somebody asked for a new password for your account at ${scheme}. Set it here:`,
      "",
      link,
      "",
      "The link works once and for a day. If it was not you, do nothing; your password stays as it is.",
    ),
  };
}

export function passwordChangedMail(scheme: string, name: string, forgotten: string): MailText {
  return {
    subject: `${scheme}: your password was changed`,
    body: lines(
      `Dear ${name},`,
      "",
      `the password of your account at ${scheme} was changed, and every other session was ended.`,
      "If it was not you, set a new one now and tell a coordinator:",
      "",
      forgotten,
    ),
  };
}
