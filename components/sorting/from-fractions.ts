/** Piles and rejects of a saved session, back in the form's fields: to be corrected, or weighed again after an undo. */
import { newId } from "@/lib/core/ids";
import type { StoredFraction } from "@/lib/sorting/queries/fractions";
import { NO_TARE, TYPED, type ReadingValue } from "../weighing/form-values";
import { kilogramText } from "../weighing/kilogram-text";
import type { Draft, PilePolymer } from "./draft";

/** What was taken off is known as one figure: it stands as a typed container. */
function readingOf({ grossMilligrams, tareMilligrams }: StoredFraction): ReadingValue {
  return {
    gross: kilogramText(grossMilligrams),
    container:
      tareMilligrams === 0 ? NO_TARE : { choice: TYPED, text: kilogramText(tareMilligrams) },
    sack: NO_TARE,
  };
}

/**
 * @param lots `none`: each pile goes where such piles go by themselves; `open`: it keeps its lot while that is open;
 *   `own`: it keeps its lot in any case, because that is where it lies (a correction)
 */
export function draftFrom(
  fractions: readonly StoredFraction[],
  scaleId: string,
  { lots }: { lots: "none" | "open" | "own" },
): Draft {
  return {
    scaleId,
    piles: fractions.flatMap((fraction) => {
      const { pile } = fraction;
      if (!pile) return [];
      const { polymer, colourCode, kind, form, wash, lotNumber, lotClosed } = pile;
      return [
        {
          id: newId(),
          // What was sorted was never "mixed": that is what a bag is before.
          polymer: polymer as PilePolymer,
          colourCode,
          kind,
          form,
          wash,
          lot: lots === "own" || (lots === "open" && !lotClosed) ? lotNumber : null,
          ...(lots === "own" ? { ownLot: lotNumber } : {}),
          reading: readingOf(fraction),
        },
      ];
    }),
    rejects: fractions.flatMap((fraction) =>
      fraction.rejectReason === null
        ? []
        : [{ id: newId(), reason: fraction.rejectReason, reading: readingOf(fraction) }],
    ),
  };
}
