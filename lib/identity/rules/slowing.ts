/**
 * Guessing gets slow, and nobody is locked out for good: a wait grows with the failures of one account
 * or one address and has an end; failures all over the program only make every answer come later.
 */
import type { Instant } from "@/lib/core/time";
import { instant } from "@/lib/core/time";

/** What is kept for a key; failures may be a fraction of time old. */
export type Tries = { failures: number; lastAt: Instant; blockedUntil: Instant };

export type SlowingRule = {
  /** Failures that cost nothing. */
  free: number;
  /** First wait; each further failure doubles it. */
  firstWaitMs: number;
  longestWaitMs: number;
  /** Without a failure for this long, the count starts anew. */
  forgetMs: number;
};

const SECOND = 1000;
const MINUTE = 60 * SECOND;
const HOUR = 60 * MINUTE;

export const SLOWING = {
  /** 5 tries, then 10 s, 20 s, 40 s … 15 min: at most some 100 guesses a day. */
  account: { free: 5, firstWaitMs: 10 * SECOND, longestWaitMs: 15 * MINUTE, forgetMs: 24 * HOUR },
  /** An address may be a whole school behind one router. */
  address: { free: 30, firstWaitMs: 10 * SECOND, longestWaitMs: 15 * MINUTE, forgetMs: HOUR },
  /** Mailed links: three an hour for one account, whether it exists or not. */
  forgotten: { free: 3, firstWaitMs: 10 * MINUTE, longestWaitMs: 30 * MINUTE, forgetMs: HOUR },
  forgottenAddress: { free: 20, firstWaitMs: MINUTE, longestWaitMs: 30 * MINUTE, forgetMs: HOUR },
} as const satisfies Record<string, SlowingRule>;

/** @returns whole seconds still to wait; 0 when a try may be made */
export function waitSeconds(tries: Tries | null, now: Instant): number {
  if (!tries || tries.blockedUntil <= now) return 0;
  return Math.ceil((tries.blockedUntil - now) / SECOND);
}

/** The key's state after one more try, counted before its outcome is known. */
export function afterTry(rule: SlowingRule, tries: Tries | null, now: Instant): Tries {
  const failures = (tries && now - tries.lastAt < rule.forgetMs ? tries.failures : 0) + 1;
  const beyond = failures - rule.free;
  const wait =
    beyond < 0 ? 0 : Math.min(rule.longestWaitMs, rule.firstWaitMs * 2 ** Math.min(beyond, 30));
  return { failures, lastAt: now, blockedUntil: instant(now + wait) };
}

/** The program-wide count drains by one in this time. */
export const GLOBAL_DRAIN_MS = 10 * SECOND;
const GLOBAL_FREE = 50;
const GLOBAL_STEP_MS = 40;
const GLOBAL_MOST_MS = 3 * SECOND;

/** The program-wide count after one more failure. */
export function afterGlobalFailure(tries: Tries | null, now: Instant): Tries {
  const drained = tries ? Math.floor((now - tries.lastAt) / GLOBAL_DRAIN_MS) : 0;
  return {
    failures: Math.max(0, (tries?.failures ?? 0) - drained) + 1,
    lastAt: now,
    blockedUntil: now,
  };
}

/** How much later every sign-in answers while many fail all over the program; never a refusal. */
export function globalDelayMs(tries: Tries | null, now: Instant): number {
  if (!tries) return 0;
  const drained = Math.floor((now - tries.lastAt) / GLOBAL_DRAIN_MS);
  const beyond = tries.failures - drained - GLOBAL_FREE;
  return beyond <= 0 ? 0 : Math.min(GLOBAL_MOST_MS, beyond * GLOBAL_STEP_MS);
}
