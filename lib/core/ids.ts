/** Ids: UUID version 7 (RFC 9562), made by the client, which is what makes a request repeatable. */

declare const idBrand: unique symbol;
/** A UUID that names one kind of thing. */
export type Id<Noun extends string> = string & { readonly [idBrand]: Noun };

export type PersonId = Id<"person">;
export type SessionId = Id<"session">;
export type PointId = Id<"point">;
export type BagId = Id<"bag">;
export type ScaleId = Id<"scale">;
export type LotId = Id<"lot">;
export type WeighInId = Id<"weigh-in">;
export type SortingId = Id<"sorting">;

const UUID_V7 = /^[0-9a-f]{8}-[0-9a-f]{4}-7[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/;

/** Is it a UUIDv7 in lower case? */
export function isUuidV7(text: string): boolean {
  return UUID_V7.test(text);
}

/**
 * A UUIDv7 (RFC 9562 section 5.7): 48 bits of Unix milliseconds, version, 74 random bits.
 *
 * @param now Unix milliseconds
 * @param random ten random bytes
 */
export function uuidV7(now: number, random: Uint8Array): string {
  const time = Math.floor(now).toString(16).padStart(12, "0");
  const bytes = Array.from(random.subarray(0, 10));
  bytes[0] = ((bytes[0] ?? 0) & 0x0f) | 0x70;
  bytes[2] = ((bytes[2] ?? 0) & 0x3f) | 0x80;
  const tail = bytes.map((byte) => byte.toString(16).padStart(2, "0")).join("");
  return `${time.slice(0, 8)}-${time.slice(8, 12)}-${tail.slice(0, 4)}-${tail.slice(4, 8)}-${tail.slice(8, 20)}`;
}

/** A fresh id from the platform's own random source (Web Crypto, in browsers and in Node alike). */
export function newId<Noun extends string>(now: number = Date.now()): Id<Noun> {
  return uuidV7(now, globalThis.crypto.getRandomValues(new Uint8Array(10))) as Id<Noun>;
}
