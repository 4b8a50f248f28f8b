/**
 * Invariant: what leaves a place is what was taken, plus or less a difference that is always named. More than the book
 * holds is asked about once and then goes through; where nothing is left, the rest of the book is difference.
 */
import { daysBetween, formatDay, type Day } from "@/lib/core/time";
import type { Basis } from "@/lib/ledger/terms";
import { negated } from "@/lib/ledger/rules/holding";
import type { DraftLine, Line } from "@/lib/ledger/rules/split";
import type { Refusal } from "@/lib/scales/rules/reading";
import type { Route } from "./terms";

/** What was taken from one place, and what the book had there. Whole grams. */
export type Load = {
  heldGrams: number;
  takenGrams: number;
  /** Nothing is left there. */
  whole: boolean;
};

export type Movement = {
  /** What the book of that place loses. */
  leavesGrams: number;
  /** Taken, and not in the book. */
  surplusGrams: number;
  /** In the book, and not taken although nothing is left. */
  remainderGrams: number;
};

export function movementOf({ heldGrams, takenGrams, whole }: Load): Movement {
  const fromBook = Math.min(heldGrams, takenGrams);
  const remainderGrams = whole ? heldGrams - fromBook : 0;
  return {
    leavesGrams: fromBook + remainderGrams,
    surplusGrams: takenGrams - fromBook,
    remainderGrams,
  };
}

/** Is it so much more than the book holds that the reading cannot explain it? Then it is weighed again or confirmed. */
export function isFarAbove(load: Load, toleranceMilligrams: number): boolean {
  return movementOf(load).surplusGrams * 1000 > toleranceMilligrams;
}

export type Place = {
  account: "lot" | "reject-bin";
  holderId: number;
  materialId: number;
};

export type Known = { basis: Basis; scaleNumber: number | null; mpeMilligrams: number | null };

/** Where it goes in the ledger: what is passed on is unproven until its receipt. */
export function outsideLine(route: Route, grams: number, known: Known): DraftLine {
  return route === "disposed"
    ? { account: "disposed", grams, ...known }
    : { account: "passed-on", cause: "unproven", grams, ...known };
}

/**
 * The entries of one place's load, in order. Taken from a place that the book calls empty it is found there first (a
 * count), because a gain needs a place to enter.
 */
export function entriesOf(
  place: Place,
  load: Load,
  route: Route,
  known: Known,
): { kind: "count" | "removal"; lines: DraftLine[] }[] {
  const { leavesGrams, surplusGrams, remainderGrams } = movementOf(load);
  const outside = outsideLine(route, load.takenGrams, known);
  if (load.heldGrams === 0) {
    return [
      {
        kind: "count",
        lines: [
          { account: "difference", grams: -surplusGrams },
          { ...place, grams: surplusGrams },
        ],
      },
      { kind: "removal", lines: [{ ...place, grams: -load.takenGrams }, outside] },
    ];
  }
  const lines: DraftLine[] = [{ ...place, grams: -leavesGrams }, outside];
  if (surplusGrams > 0) lines.push({ account: "difference", grams: -surplusGrams });
  if (remainderGrams > 0) lines.push({ account: "difference", grams: remainderGrams });
  return [{ kind: "removal", lines }];
}

/**
 * The entries of a receipt: each amount that a removal passed on comes back with its own parts and goes out proven.
 * The mass that left is what the shed weighed: what the receiver weighed differently is kept beside it and not posted,
 * or the same grams would leave twice.
 *
 * @param passedOn the removal's lines on passed-on, unproven; one entry for each, because a draft has one such line
 */
export function receiptEntries(passedOn: readonly Line[]): DraftLine[][] {
  return passedOn.map(({ materialId, grams, parts }) => [
    {
      account: "passed-on",
      cause: "unproven",
      grams: -grams,
      from: {
        materialId,
        parts: {
          O: negated(parts.O),
          H: negated(parts.H),
        },
      },
    },
    { account: "passed-on", cause: "proven", grams },
  ]);
}

/** Refuses a day that has not come, or that is before the scheme began. */
export function refuseDay(day: Day, today: Day, firstDay: Day): Refusal | null {
  if (day > today) return { code: "future-time", detail: { when: formatDay(day) }, path: ["day"] };
  if (day < firstDay) {
    return { code: "too-long-ago", detail: { when: formatDay(day) }, path: ["day"] };
  }
  return null;
}

/** How a permit stands: `ends-soon` in its last 30 days. */
export type PermitState = "none" | "good" | "ends-soon" | "over";

const SOON_DAYS = 30;

export function permitState(permitUntil: Day | null, today: Day): PermitState {
  if (permitUntil === null) return "none";
  const daysLeft = daysBetween(today, permitUntil);
  if (daysLeft < 0) return "over";
  return daysLeft <= SOON_DAYS ? "ends-soon" : "good";
}
