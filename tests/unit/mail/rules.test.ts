import { describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { nextAttempt } from "@/lib/mail/rules";

const MINUTE = 60_000;
const start = instant(1_000_000_000_000);

describe("a mail that did not go out", () => {
  it("is tried after 1, 2, 4 … at most 60 minutes", () => {
    const pauses = [1, 2, 3, 4, 5, 6, 7, 8, 20].map((attempts) => {
      const next = nextAttempt(attempts, start, start);
      return next === null ? null : (next - start) / MINUTE;
    });
    expect(pauses).toEqual([1, 2, 4, 8, 16, 32, 60, 60, 60]);
  });

  it("is given up after a day, when its link is worth nothing any more", () => {
    let now: number = start;
    let attempts = 0;
    for (;;) {
      attempts += 1;
      const next = nextAttempt(attempts, start, instant(now));
      if (next === null) break;
      now = next;
    }
    expect((now - start) / MINUTE).toBeLessThanOrEqual(24 * 60);
    expect((now - start) / MINUTE).toBeGreaterThan(22 * 60);
  });
});
