/**
 * A mail is tried again with growing pauses for a day and then given up: what it brings (a link that
 * works for a day) is worth nothing after that, and its body must not lie about in clear.
 */
import type { Instant } from "@/lib/core/time";
import { instant } from "@/lib/core/time";

const MINUTE = 60 * 1000;
const HOUR = 60 * MINUTE;
const GIVE_UP_MS = 24 * HOUR;

/**
 * What follows a failed attempt.
 *
 * @param attempts made so far, this one included
 * @returns when to try again (1, 2, 4 … at most 60 minutes later), or null to give up
 */
export function nextAttempt(attempts: number, createdAt: Instant, now: Instant): Instant | null {
  const at = now + Math.min(HOUR, MINUTE * 2 ** Math.min(attempts - 1, 10));
  return at - createdAt > GIVE_UP_MS ? null : instant(at);
}
