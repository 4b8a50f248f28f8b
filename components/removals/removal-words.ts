import type { RemovalSummary } from "@/lib/removals/queries/removals";
import type { Tone } from "@/components/ui/figure";

/** What became of a removal, in words, and the tone that goes with them. */
export function stateWords(removal: Pick<RemovalSummary, "state" | "route" | "receiptNumber">): {
  words: string;
  tone: Tone;
} {
  if (removal.state === "undone") return { words: "Undone", tone: "soft" };
  if (removal.state === "corrected") return { words: "Corrected", tone: "soft" };
  if (removal.route === "disposed") return { words: "Disposed of", tone: "ink" };
  return removal.receiptNumber === null
    ? { words: "Passed on, unproven", tone: "warn" }
    : { words: "Passed on, proven", tone: "ok" };
}

/** Book less what was taken, where the place is empty now. */
export function differenceWords(differenceGrams: number, kg: string): string {
  return differenceGrams > 0
    ? `${kg} kg less than the book had`
    : `${kg} kg more than the book had`;
}
