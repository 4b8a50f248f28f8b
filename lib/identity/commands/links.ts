/** Mailed links: they work once and for a day, and only a hash of their token is kept. */
import "server-only";
import { randomBytes } from "node:crypto";
import { AppError } from "@/lib/core/errors";
import type { PersonId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { prepared, type Tx } from "@/lib/platform/database";
import { settings } from "@/lib/platform/env";
import { findLink, linkHash, type LinkPerson } from "../queries";
import { LINK_MS, type LinkPurpose } from "../terms";

/**
 * Makes a link; every earlier one of the person stops working.
 *
 * @returns its address, under PUBLIC_URL and never under what a request calls its host
 */
export function makeLinkIn(tx: Tx, personId: PersonId, purpose: LinkPurpose, now: Instant): string {
  endLinksIn(tx, personId, now);
  const token = randomBytes(32).toString("base64url");
  prepared(
    tx.client,
    `insert into account_links (token_hash, person_id, purpose, created_at, expires_at)
     values (?, ?, ?, ?, ?)`,
  ).run(linkHash(token), personId, purpose, now, now + LINK_MS);
  return `${settings().publicUrl}/set-password/${token}`;
}

/** Ends every link of a person that was not used. */
export function endLinksIn(tx: Tx, personId: PersonId, now: Instant): void {
  prepared(
    tx.client,
    "update account_links set expires_at = ? where person_id = ? and used_at is null and expires_at > ?",
  ).run(now, personId, now);
}

/**
 * Uses a link up.
 *
 * @throws AppError `link-expired` when it was used, is older than a day, or its person was removed
 */
export function useLinkIn(tx: Tx, token: string, now: Instant): LinkPerson {
  const link = findLink(tx, token, now);
  if (!link) throw new AppError("link-expired");
  prepared(tx.client, "update account_links set used_at = ? where token_hash = ?").run(
    now,
    linkHash(token),
  );
  return link;
}
