/**
 * Invariant: a lot becomes what was counted, to the gram; what was counted without seeing the last count or movement is
 * asked about once and never lost.
 */
import type { Instant } from "@/lib/core/time";

/** What somebody saw of a lot, and what it is by now. */
export type Seen = { entryId: number; countId: string | null };

/** What happened since; a count is told before a movement, because it says what somebody found. */
export function judgeSeen(seen: Seen, now: Seen): "same" | "counted" | "moved" {
  if (now.countId !== seen.countId) return "counted";
  return now.entryId === seen.entryId ? "same" : "moved";
}

/**
 * When something was weighed at a lot: between its opening and now, whatever a phone's clock says, because nothing
 * can be weighed before there is a lot or after the server heard of it.
 */
export function doneAt(claimed: Instant, openedAt: Instant, now: Instant): Instant {
  if (claimed > now) return now;
  return claimed < openedAt ? openedAt : claimed;
}
