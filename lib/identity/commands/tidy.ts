/** What the program forgets by itself about signing in. */
import "server-only";
import type { Instant } from "@/lib/core/time";
import { inTransaction, prepared } from "@/lib/platform/database";
import type { Context } from "@/lib/platform/context";
import { dropOldTriesIn } from "./slowing";

const WEEK_MS = 7 * 24 * 60 * 60 * 1000;

/**
 * Drops counted tries that no rule remembers, and links and sessions that are over for a week. In small
 * pieces, each a transaction of its own, so that no write waits for it.
 *
 * @returns how many rows went
 */
export function tidyIdentity(db: Context["db"], now: Instant): number {
  const before = now - WEEK_MS;
  let dropped = 0;
  for (;;) {
    const count = inTransaction({ db }, (tx) => {
      const links = prepared(
        tx.client,
        `delete from account_links where token_hash in
           (select token_hash from account_links where expires_at < ? limit 500)`,
      ).run(before).changes;
      const sessions = prepared(
        tx.client,
        `delete from sessions where id in
           (select id from sessions where expires_at < ? or ended_at < ? limit 500)`,
      ).run(before, before).changes;
      return links + sessions + dropOldTriesIn(tx, now);
    });
    dropped += count;
    if (count === 0) return dropped;
  }
}
