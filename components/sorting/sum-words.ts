import { formatKg } from "@/lib/core/mass";
import type { SumVerdict } from "@/lib/sorting/rules/table";

/** What stands under the bar: how piles and net compare, in a volunteer's words. */
export function sumWords(
  verdict: SumVerdict,
  of: { fractions: number; bags: number },
  toleranceMilligrams: number,
): { words: string; tone: "soft" | "ok" | "warn" } {
  const size = Math.abs(verdict.differenceGrams);
  const held = of.bags === 1 ? "the bag held" : "the bags held";
  if (of.bags === 0) return { words: "Put a bag on the table first.", tone: "soft" };
  if (of.fractions === 0) return { words: "Weigh the first pile.", tone: "soft" };
  if (verdict.kind === "within") {
    if (size === 0) return { words: "All of it is on the table.", tone: "ok" };
    const side = verdict.differenceGrams > 0 ? "left over" : `more than ${held}`;
    return { words: `${size} g ${side}, within what the scale can tell.`, tone: "ok" };
  }
  if (verdict.differenceGrams > 0) {
    return { words: `${formatKg(size)} kg still to weigh.`, tone: "soft" };
  }
  return {
    words: `${formatKg(size)} kg more than ${held}; the scale can explain ${formatKg(Math.floor(toleranceMilligrams / 1000))} kg.`,
    tone: "warn",
  };
}
