import { describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { COMMON_PASSWORDS } from "@/lib/identity/rules/common-passwords";
import { checkPassword } from "@/lib/identity/rules/password";
import { checkChange, homeOf, safeNext } from "@/lib/identity/rules/people";
import {
  afterGlobalFailure,
  afterTry,
  GLOBAL_DRAIN_MS,
  globalDelayMs,
  SLOWING,
  waitSeconds,
  type Tries,
} from "@/lib/identity/rules/slowing";
import { LEAST_PASSWORD, MOST_PASSWORD } from "@/lib/identity/terms";

const problem = (typed: string, own: string[] = []) => {
  const verdict = checkPassword(typed, own);
  return verdict.ok ? "good" : verdict.problem;
};

describe("a password", () => {
  it("is judged by its length, counted in characters and not in bytes", () => {
    expect(problem("tidal mud")).toBe("password-too-short");
    expect(problem("tidal muds")).toBe("good");
    expect(problem("🦀🐚🦪🐟🦀🐚🦪🐟🪶")).toBe("password-too-short");
    expect(problem("x1 ".repeat(70))).toBe("password-too-long");
    expect(problem("Regenpfeifer äöü ".repeat(11).slice(0, MOST_PASSWORD))).toBe("good");
  });

  it("may be made of anything, blanks too", () => {
    for (const typed of [
      "correct tide table",
      "nurkleinbuchstaben",
      "7391 0482 6657",
      "ёлка на берегу",
    ]) {
      expect(problem(typed)).toBe("good");
    }
  });

  it.each([
    "password12",
    "Password2026!",
    "P A S S W O R D 1 2",
    "qwertyuiop",
    "1234567890",
    "0987654321",
    "abcdefghijk",
    "aaaaaaaaaaaa",
    "abababababab",
    "iloveyou2026",
    "changeme1234",
    "1q2w3e4r5t6y",
    "saltmarsh2026",
  ])("%s is one of the first that anybody tries", (typed) => {
    expect(problem(typed)).toBe("password-too-common");
  });

  it("is not the person's own name or address", () => {
    const own = ["Wren Tidewell", "wren.tidewell@saltmarsh.example"];
    expect(problem("wrentidewell", own)).toBe("password-too-common");
    expect(problem("Wren Tidewell 26", own)).toBe("password-too-common");
    expect(problem("wren.tidewell@saltmarsh.example", own)).toBe("password-too-common");
    expect(problem("tidewell sings", own)).toBe("good");
  });

  it("is the same however its accents were composed", () => {
    const composed = checkPassword("caf\u00e9 by the quay", []);
    const apart = checkPassword("cafe\u0301 by the quay", []);
    expect(composed).toEqual(apart);
  });

  it("has a list in lower case, without words too short to matter", () => {
    expect(COMMON_PASSWORDS.size).toBeGreaterThan(250);
    for (const word of COMMON_PASSWORDS) expect(word).toBe(word.toLowerCase());
    expect(LEAST_PASSWORD).toBeGreaterThanOrEqual(8);
  });
});

describe("slowing", () => {
  const start = instant(1_000_000_000_000);
  const fail = (count: number, rule = SLOWING.account): Tries => {
    let tries: Tries | null = null;
    let now = start;
    for (let made = 0; made < count; made += 1) {
      tries = afterTry(rule, tries, now);
      now = instant(Math.max(now, tries.blockedUntil));
    }
    if (!tries) throw new Error("no try");
    return tries;
  };
  const waitAfter = (count: number) => {
    const tries = fail(count);
    return waitSeconds(tries, tries.lastAt);
  };

  it("costs nothing at first, then doubles up to a quarter of an hour", () => {
    expect([1, 2, 3, 4].map(waitAfter)).toEqual([0, 0, 0, 0]);
    expect([5, 6, 7, 8].map(waitAfter)).toEqual([10, 20, 40, 80]);
    expect(waitAfter(12)).toBe(900);
    expect(waitAfter(400)).toBe(900);
  });

  it("allows some hundred guesses a day on one account", () => {
    let tries: Tries | null = null;
    let now: number = start;
    let made = 0;
    while (now < start + 24 * 60 * 60 * 1000) {
      tries = afterTry(SLOWING.account, tries, instant(now));
      made += 1;
      now = Math.max(now + 1, tries.blockedUntil);
    }
    expect(made).toBeLessThan(120);
  });

  it("forgets after a quiet day", () => {
    const later = instant(fail(9).lastAt + SLOWING.account.forgetMs);
    expect(afterTry(SLOWING.account, fail(9), later).failures).toBe(1);
  });

  it("never turns everybody away: failures all over only delay, and drain", () => {
    let tries: Tries | null = null;
    for (let made = 0; made < 5000; made += 1) tries = afterGlobalFailure(tries, start);
    expect(globalDelayMs(tries, start)).toBe(3000);
    expect(waitSeconds(tries, start)).toBe(0);
    expect(globalDelayMs(tries, instant(start + 5000 * GLOBAL_DRAIN_MS))).toBe(0);
    expect(globalDelayMs(afterGlobalFailure(null, start), start)).toBe(0);
  });
});

describe("roles and removal", () => {
  const [me, other] = [newId<"person">(), newId<"person">()];
  const coordinator = { id: other, role: "coordinator" as const, joined: true };

  it("keeps one coordinator who can sign in", () => {
    expect(checkChange(coordinator, "lead", me, 1)).toBe("last-coordinator");
    expect(checkChange(coordinator, null, null, 1)).toBe("last-coordinator");
    expect(checkChange(coordinator, "lead", me, 2)).toBeNull();
    expect(checkChange({ ...coordinator, joined: false }, null, me, 1)).toBeNull();
    expect(checkChange({ ...coordinator, role: "lead" }, null, me, 1)).toBeNull();
  });

  it("lets nobody change or remove themselves", () => {
    expect(checkChange({ ...coordinator, id: me }, "lead", me, 3)).toBe("own-role");
    expect(checkChange({ ...coordinator, id: me }, null, me, 3)).toBe("own-role");
    expect(checkChange({ ...coordinator, id: me }, "coordinator", me, 3)).toBeNull();
  });

  it("begins where the role works", () => {
    expect([homeOf("donor"), homeOf("volunteer"), homeOf("coordinator")]).toEqual([
      "/account",
      "/today",
      "/today",
    ]);
  });
});

describe("where to go after signing in", () => {
  it.each(["/stock", "/stock/lots/118?x=1", "/people#a", "/"])("%s is ours", (wish) => {
    expect(safeNext(wish)).toBe(wish);
  });

  it.each([
    "//evil.example",
    "/\\evil.example",
    "https://evil.example/",
    "javascript:alert(1)",
    "/\t/evil.example",
    "/\n/evil.example",
    "/./\t/evil.example",
    "/.//evil.example",
    "stock",
    "",
    null,
  ])("%j is not", (wish) => {
    expect(safeNext(wish)).toBeNull();
  });
});
