/** Invariant: whoever asked for a draft within the last minute has it open; a bag's code alone says whether it is to be sorted alone. */
import { codeNumber, type LabelCode } from "@/lib/core/bag-code";

/** A page asks again well within this. */
export const PRESENT_MS = 60_000;

export function isPresent(seenAt: number, now: number): boolean {
  return now - seenAt <= PRESENT_MS;
}

/** One bag in so many is to be sorted alone, so that its point's reject rate is known (product.md, Sorting). */
const ONE_ALONE_IN = 10;

/**
 * Is this bag one of those picked at random to be sorted alone? Codes are drawn at random, so the code itself is
 * the draw: the same bag is always or never picked, whoever asks.
 */
export function suggestAlone(code: LabelCode): boolean {
  return codeNumber(code) % ONE_ALONE_IN === 0;
}
