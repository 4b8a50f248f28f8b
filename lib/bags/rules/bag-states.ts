/**
 * Invariant: a bag passes through its states in order (printed, out, picked up, weighed, sorted, closed),
 * may leave out what nobody recorded before the scale, and goes back only by an undo: from sorted to weighed,
 * and from weighed to what it was before.
 */
import { daysBetween, dayOf, type Instant } from "@/lib/core/time";
import type { BagState } from "../terms";

const NEXT: Record<BagState, readonly BagState[]> = {
  // A tag taken straight to the scale was never recorded as out or picked up; a tag whose bag code was
  // given to another bag (a replaced tag) is closed unused.
  printed: ["out", "picked-up", "weighed", "closed"],
  out: ["picked-up", "weighed"],
  "picked-up": ["weighed"],
  weighed: ["sorted", "picked-up"],
  sorted: ["closed", "weighed"],
  closed: [],
};

/** May a bag go from one state to another? */
export function mayMove(from: BagState, to: BagState): boolean {
  return NEXT[from].includes(to);
}

/** May the bag be weighed in now? */
export function awaitsWeighing(state: BagState): boolean {
  return mayMove(state, "weighed") && state !== "sorted";
}

/** A printed tag that belongs to no point yet may become any bag's tag. */
export function isSpare(bag: { state: BagState; pointId: string | null }): boolean {
  return bag.state === "printed" && bag.pointId === null;
}

/** Whole days, by the calendar of the scheme's zone, that the bag has been in its state. */
export function stateAgeDays(since: Instant, now: Instant, zone: string): number {
  return Math.max(0, daysBetween(dayOf(since, zone), dayOf(now, zone)));
}
