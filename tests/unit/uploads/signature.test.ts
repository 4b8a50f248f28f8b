import { createHmac } from "node:crypto";
import { describe, expect, it } from "vitest";
import { isSame, readSigned, sign } from "@/lib/cli/fake-storage/signature";

const KEY = "sk_fake_test";
const ORIGIN = "http://localhost:4151";
const NOW = 1_000_000;

const target = (query: string): string => {
  const signed = `/KEY?${query}`;
  return `${signed}&signature=${encodeURIComponent(sign(ORIGIN + signed, KEY))}`;
};

describe("a signed address", () => {
  it("is signed as the service does it, over the whole of it", () => {
    const text = `${ORIGIN}/KEY?expires=5`;
    expect(sign(text, KEY)).toBe(
      `hmac-sha256=${createHmac("sha256", KEY).update(text).digest("hex")}`,
    );
  });

  it("gives its parameters, each encoded once more than usual", () => {
    const read = readSigned(
      ORIGIN,
      target("expires=1000001&x-ut-file-type=image%252Fjpeg"),
      KEY,
      NOW,
    );
    expect(read.ok && read.parameters.get("x-ut-file-type")).toBe("image/jpeg");
  });

  it.each([
    ["another origin", "http://localhost:4152", target("expires=1000001"), KEY, 401],
    ["another key", ORIGIN, target("expires=1000001"), "sk_fake_other", 401],
    [
      "a changed parameter",
      ORIGIN,
      target("expires=1000001").replace("1000001", "1000002"),
      KEY,
      401,
    ],
    ["one more parameter", ORIGIN, `${target("expires=1000001")}&acl=public-read`, KEY, 401],
    ["no signature", ORIGIN, "/KEY?expires=1000001", KEY, 401],
    ["its last moment", ORIGIN, target("expires=1000000"), KEY, 403],
    ["no end", ORIGIN, target("a=b"), KEY, 403],
  ] as const)("is refused with %s", (_, origin, address, key, status) => {
    expect(readSigned(origin, address, key, NOW)).toMatchObject({ ok: false, status });
  });

  it("compares without stopping at the first difference, whatever the lengths", () => {
    expect(isSame("abc", "abc")).toBe(true);
    expect(isSame("abc", "abd")).toBe(false);
    expect(isSame("abc", "ab")).toBe(false);
    expect(isSame("", "a")).toBe(false);
  });
});
