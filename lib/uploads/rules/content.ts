/**
 * Invariant: what a file is, is said by its bytes. Its name and the type that the browser declares are the
 * sender's say and decide nothing.
 */

export type PictureKind = "jpeg" | "png" | "webp" | "heic";

const startsWith = (bytes: Uint8Array, at: number, wanted: readonly number[]): boolean =>
  wanted.every((byte, place) => bytes[at + place] === byte);

const text = (bytes: Uint8Array, from: number, until: number): string =>
  String.fromCharCode(...bytes.subarray(from, until));

/** Brands of ISO/IEC 23008-12 (HEIF) files that phones write; AVIF, which is none of them, is not taken either. */
const HEIC_BRANDS = new Set([
  ...["heic", "heix", "heim", "heis", "hevc", "hevx", "hevm", "hevs"],
  ...["mif1", "msf1"],
]);

/**
 * The kind of a picture by its first bytes: JPEG (ISO/IEC 10918-1 SOI and a marker), PNG (ISO/IEC 15948
 * signature), WebP (RIFF container), HEIC (ISO base media `ftyp` with one of its brands).
 *
 * @param bytes at least the first 12, where there are so many
 * @returns null for everything else
 */
export function pictureKind(bytes: Uint8Array): PictureKind | null {
  if (startsWith(bytes, 0, [0xff, 0xd8, 0xff])) return "jpeg";
  if (startsWith(bytes, 0, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return "png";
  if (text(bytes, 0, 4) === "RIFF" && text(bytes, 8, 12) === "WEBP") return "webp";
  if (text(bytes, 4, 8) === "ftyp" && HEIC_BRANDS.has(text(bytes, 8, 12))) return "heic";
  return null;
}
