/** Words about a scanned bag. */
import type { BagState } from "@/lib/bags/terms";
import { formatCode } from "@/lib/core/bag-code";
import { dayOf, daysBetween, type Instant } from "@/lib/core/time";

/** "today", "yesterday", "12 days ago", by the calendar of the scheme's zone. */
export function agoWords(since: Instant, now: Instant, zone: string): string {
  const days = daysBetween(dayOf(since, zone), dayOf(now, zone));
  if (days <= 0) return "today";
  return days === 1 ? "yesterday" : `${days} days ago`;
}

const SINCE: Record<BagState, string> = {
  printed: "tag printed",
  out: "left there",
  "picked-up": "picked up",
  weighed: "weighed",
  sorted: "sorted",
  closed: "closed",
};

/** "left there 2 days ago" */
export function bagAge(state: BagState, since: Instant, now: Instant, zone: string): string {
  return `${SINCE[state]} ${agoWords(since, now, zone)}`;
}

/** What to do with a code that was drawn for a bag without a tag. */
export function drawnWords(code: string): string {
  return `Write ${formatCode(code)} on the bag, large; it is its tag now.`;
}
