/**
 * UUID version 7. Source: RFC 9562, appendix A.6, example of a UUIDv7 value (read in the draft's
 * repository, ietf-wg-uuidrev/rfc4122bis at 6fbd9f0):
 * 017F22E2-79B0-7CC3-98C4-DC0C0C07398F, unix_ts_ms 0x017F22E279B0 = 1645557742000,
 * rand_a 0xCC3, var 0b10, rand_b 0b01 and 0x8C4DC0C0C07398F.
 */
import { describe, expect, it } from "vitest";
import { isUuidV7, uuidV7 } from "@/lib/core/ids";

const TIME = 1_645_557_742_000;

/** The ten random bytes as the RFC lays them out: rand_a in 12 bits, rand_b in 62, top bits left to version and variant. */
function randomBytes(randA: bigint, randB: bigint): Uint8Array {
  const tail = (randA << 64n) | randB;
  return Uint8Array.from({ length: 10 }, (_unused, index) =>
    Number((tail >> BigInt(72 - 8 * index)) & 0xffn),
  );
}

describe("RFC 9562 UUIDv7", () => {
  it("makes the RFC's example from its fields", () => {
    const randB = (0b01n << 60n) | 0x8c4dc0c0c07398fn;
    expect(uuidV7(TIME, randomBytes(0xcc3n, randB))).toBe("017f22e2-79b0-7cc3-98c4-dc0c0c07398f");
  });

  it("sets version and variant over whatever stands there", () => {
    const ones = uuidV7(TIME, new Uint8Array(10).fill(0xff));
    expect(ones).toBe("017f22e2-79b0-7fff-bfff-ffffffffffff");
    const zeros = uuidV7(TIME, new Uint8Array(10));
    expect(zeros).toBe("017f22e2-79b0-7000-8000-000000000000");
    expect(isUuidV7(ones) && isUuidV7(zeros)).toBe(true);
  });

  it("holds the time of the example", () => {
    expect(new Date(TIME).toISOString()).toBe("2022-02-22T19:22:22.000Z");
    expect(0x017f22e279b0).toBe(TIME);
  });
});
