/** Invariant: a lot that has been open for the scheme's set weeks takes no more; without a setting age closes nothing. */
import { instant, type Instant } from "@/lib/core/time";
import { LOT_END_NAMES, type LotEnd } from "../terms";

const WEEK_MS = 7 * 24 * 60 * 60 * 1000;

/** Lots opened at this moment or before are too old; null when age never closes one. */
export function oldestOpening(lotWeeks: number | null, now: Instant): Instant | null {
  return lotWeeks === null ? null : instant(Math.max(0, now - lotWeeks * WEEK_MS));
}

/** "its container is full"; a lot closed before reasons were kept has none. */
export function endWords(closedFor: LotEnd | null): string | null {
  return closedFor === null ? null : LOT_END_NAMES[closedFor];
}
