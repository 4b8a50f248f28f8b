import { describe, expect, it } from "vitest";
import { readAddress, readCookie } from "@/lib/http/actor";
import { contentSecurityPolicy } from "@/lib/http/security-headers";

describe("the caller's address", () => {
  it("is believed from the right, as many places as there are proxies of our own", () => {
    const header = "6.6.6.6, 203.0.113.9, 10.0.0.2";
    expect(readAddress(header, 0)).toBeNull();
    expect(readAddress(header, 1)).toBe("10.0.0.2");
    expect(readAddress(header, 2)).toBe("203.0.113.9");
    expect(readAddress("203.0.113.9", 2)).toBeNull();
    expect(readAddress(null, 1)).toBeNull();
  });
});

describe("a cookie", () => {
  it("is found by its whole name", () => {
    expect(readCookie("a=1; b=2;c=3", "b")).toBe("2");
    expect(readCookie("a=1; b=2;c=3", "c")).toBe("3");
    expect(readCookie("xb=9; b=2", "b")).toBe("2");
    expect(readCookie("xb=9", "b")).toBeNull();
    expect(readCookie("b=", "b")).toBeNull();
    expect(readCookie(null, "b")).toBeNull();
  });
});

describe("the policy of a page", () => {
  const directives = (development: boolean) =>
    new Map(
      contentSecurityPolicy("N0nce", development, "http://localhost:4151")
        .split("; ")
        .map((line) => [line.slice(0, line.indexOf(" ")), line.slice(line.indexOf(" ") + 1)]),
    );

  it("runs scripts by nonce only, and allows no inline script or style element", () => {
    const policy = directives(false);
    // No WebAssembly either: that is for the scanner's worker, by the policy of its own answer.
    expect(policy.get("script-src")).toBe("'self' 'nonce-N0nce' 'strict-dynamic'");
    expect(policy.get("worker-src")).toBe("'self'");
    expect(policy.get("style-src")).toBe("'self' 'nonce-N0nce'");
    expect(policy.get("style-src-attr")).toBe("'unsafe-inline'");
    for (const name of ["object-src", "base-uri", "frame-ancestors"])
      expect(policy.get(name)).toBe("'none'");
    expect(policy.get("form-action")).toBe("'self'");
    expect(policy.get("connect-src")).toBe("'self' http://localhost:4151");
    expect(policy.get("img-src")).toBe("'self' blob: data:");
  });

  it("is looser in development alone", () => {
    expect(directives(true).get("script-src")).toContain("'unsafe-eval'");
    expect(directives(false).get("script-src")).not.toContain("'unsafe-eval'");
  });
});
