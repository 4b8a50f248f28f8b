import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { isUuidV7, newId, uuidV7 } from "@/lib/core/ids";

const random = fc.uint8Array({ minLength: 10, maxLength: 10 });
const now = fc.integer({ min: 0, max: 2 ** 48 - 1 });

describe("UUIDv7", () => {
  it("has its version, its variant and its time, whatever the random bytes", () => {
    fc.assert(
      fc.property(now, random, (time, bytes) => {
        const id = uuidV7(time, bytes);
        expect(isUuidV7(id)).toBe(true);
        expect(parseInt(id.replaceAll("-", "").slice(0, 12), 16)).toBe(time);
      }),
    );
  });

  it("keeps all 74 random bits", () => {
    fc.assert(
      fc.property(random, fc.nat({ max: 9 }), fc.nat({ max: 7 }), (bytes, place, bit) => {
        const fixed = (place === 0 && bit >= 4) || (place === 2 && bit >= 6);
        const other = Uint8Array.from(bytes);
        other[place] = (other[place] ?? 0) ^ (1 << bit);
        expect(uuidV7(0, bytes) === uuidV7(0, other)).toBe(fixed);
      }),
    );
  });

  it("sorts by time as text", () => {
    fc.assert(
      fc.property(now, now, random, random, (early, late, some, others) => {
        fc.pre(early < late);
        expect(uuidV7(early, some) < uuidV7(late, others)).toBe(true);
      }),
    );
  });

  it("does not change the bytes that it was given", () => {
    const bytes = new Uint8Array(10).fill(0xff);
    uuidV7(1, bytes);
    expect([...bytes]).toEqual(new Array(10).fill(0xff));
  });

  it("is new each time", () => {
    const made = new Set(Array.from({ length: 1000 }, () => newId<"bag">(5)));
    expect(made.size).toBe(1000);
    expect([...made].every(isUuidV7)).toBe(true);
  });

  it.each([
    "017F22E2-79B0-7CC3-98C4-DC0C0C07398F",
    "017f22e2-79b0-4cc3-98c4-dc0c0c07398f",
    "017f22e2-79b0-7cc3-c8c4-dc0c0c07398f",
    "017f22e279b07cc398c4dc0c0c07398f",
    "017f22e2-79b0-7cc3-98c4-dc0c0c07398f ",
    "",
  ])('"%s" is not one in our form', (text) => {
    expect(isUuidV7(text)).toBe(false);
  });
});
