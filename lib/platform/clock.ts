/** The one place that reads the clock; tests pass their own instants in the context instead. */
import { instant, type Instant } from "@/lib/core/time";

export function now(): Instant {
  return instant(Date.now());
}
