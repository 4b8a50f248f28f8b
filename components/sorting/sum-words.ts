import { formatKg } from "@/lib/core/mass";
import type { SumVerdict } from "@/lib/sorting/rules";

/** What stands under the bar: how piles and net compare, in a volunteer's words. */
export function sumWords(
  verdict: SumVerdict,
  count: number,
  toleranceMilligrams: number,
): { words: string; tone: "soft" | "ok" | "warn" } {
  const size = Math.abs(verdict.differenceGrams);
  if (count === 0) return { words: "Weigh the first pile.", tone: "soft" };
  if (verdict.kind === "within") {
    if (size === 0) return { words: "All of it is on the table.", tone: "ok" };
    const side = verdict.differenceGrams > 0 ? "left over" : "more than the bag held";
    return { words: `${size} g ${side}, within what the scale can tell.`, tone: "ok" };
  }
  if (verdict.differenceGrams > 0) {
    return { words: `${formatKg(size)} kg still to weigh.`, tone: "soft" };
  }
  return {
    words: `${formatKg(size)} kg more than the bag held; the scale can explain ${formatKg(Math.floor(toleranceMilligrams / 1000))} kg.`,
    tone: "warn",
  };
}
