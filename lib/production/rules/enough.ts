/**
 * Invariant: a plan is called enough only when every colour's free stock covers its grams, and a day is named only where
 * the intake of enough weeks was seen.
 */
import { addDays, type Day } from "@/lib/core/time";
import type { ColourStock, PlanStock } from "../contract/plans";
import { gramsOfBlend, type Share } from "./blend";
import { mostPieces } from "./feedstock";

/** Intake is judged by so many full weeks, and not at all by fewer than the least. */
export const INTAKE_WEEKS = 12;
export const LEAST_WEEKS = 6;
/** Farther than this a day means nothing. */
const FARTHEST_WEEKS = 104;

export type ColourNeed = {
  colour: ColourStock;
  grams: number;
  shortGrams: number;
  /** When it should be there at the usual intake; null where it is there, or where nothing can be said. */
  due: Due | null;
};

/** The day at the middle week's intake, at a good week's, at a poor week's (null: not to be foreseen). */
export type Due = { day: Day; early: Day; late: Day | null };

/**
 * The quantile of a list by linear interpolation between its closest ranks (Hyndman and Fan 1996, type 7; the formula
 * is from memory).
 */
export function quantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  const at = (sorted.length - 1) * share;
  const low = sorted[Math.floor(at)] ?? 0;
  const high = sorted[Math.ceil(at)] ?? low;
  return low + (high - low) * (at - Math.floor(at));
}

/** @param keepsThousandths what is left of intake after the steps that the method needs */
export function dueOf(
  shortGrams: number,
  weeks: readonly number[],
  keepsThousandths: number,
  today: Day,
): Due | null {
  if (weeks.length < LEAST_WEEKS) return null;
  const after = (share: number): Day | null => {
    const perWeek = (quantile(weeks, share) * keepsThousandths) / 1000;
    if (perWeek <= 0) return null;
    const needed = shortGrams / perWeek;
    return needed > FARTHEST_WEEKS ? null : addDays(today, Math.ceil(needed * 7));
  };
  const day = after(0.5);
  const early = after(0.75);
  return day && early ? { day, early, late: after(0.25) } : null;
}

/** Each colour of the blend against the stock. A colour that the stock does not know has nothing. */
export function judgeBlend(
  grams: number,
  shares: readonly Share[],
  stock: PlanStock,
): ColourNeed[] {
  const parts = gramsOfBlend(grams, shares);
  return shares.map(({ colourCode }, at): ColourNeed => {
    const colour = stock.colours.find(({ code }) => code === colourCode) ?? nothingOf(colourCode);
    const needed = parts[at] ?? 0;
    const shortGrams = Math.max(0, needed - colour.freeGrams);
    return {
      colour,
      grams: needed,
      shortGrams,
      due:
        shortGrams > 0
          ? dueOf(shortGrams, colour.weeks, stock.keepsThousandths, stock.today as Day)
          : null,
    };
  });
}

/** A colour that was retired after it was planned. */
const nothingOf = (code: string): ColourStock => ({
  code,
  name: code,
  hex: "#808080",
  look: "solid",
  freeGrams: 0,
  reservedGrams: 0,
  heatedGrams: 0,
  kinds: [],
  afterSteps: [],
  weeks: [],
});

/**
 * How many pieces the free stock makes in this blend.
 *
 * @param gramsFor need of so many pieces, start-up and purge counted
 */
export function piecesFromFree(
  gramsFor: (pieces: number) => number,
  shares: readonly Share[],
  stock: PlanStock,
  most: number,
): number {
  return mostPieces(
    (pieces) =>
      pieces === 0 ||
      judgeBlend(gramsFor(pieces), shares, stock).every(({ shortGrams }) => shortGrams === 0),
    most,
  );
}

/** Other colours whose free stock would do in full in a short one's place; the fullest first. */
export function wouldDo(
  need: ColourNeed,
  shares: readonly Share[],
  stock: PlanStock,
): ColourStock[] {
  return stock.colours
    .filter(
      ({ code, freeGrams }) =>
        freeGrams >= need.grams && !shares.some(({ colourCode }) => colourCode === code),
    )
    .sort((a, b) => b.freeGrams - a.freeGrams);
}

export type Caution =
  { kind: "heated"; thousandths: number; mostThousandths: number } | { kind: "flow" };

/** Material heated too often, and kinds that flow differently. */
export function cautionsOf(
  needs: readonly ColourNeed[],
  mostHeatedThousandths: number | null,
): Caution[] {
  const cautions: Caution[] = [];
  let heated = 0;
  let grams = 0;
  for (const { colour, grams: needed } of needs) {
    const held = colour.freeGrams + colour.reservedGrams;
    grams += needed;
    if (held > 0) heated += (needed * colour.heatedGrams) / held;
  }
  const thousandths = grams > 0 ? Math.round((heated * 1000) / grams) : 0;
  if (mostHeatedThousandths !== null && thousandths > mostHeatedThousandths) {
    cautions.push({ kind: "heated", thousandths, mostThousandths: mostHeatedThousandths });
  }
  const kinds = new Set(needs.flatMap(({ colour }) => colour.kinds));
  if (kinds.has("lids") && kinds.has("bottles")) cautions.push({ kind: "flow" });
  return cautions;
}
