import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { whenWords } from "@/lib/weighing/rules";
import type { Asking } from "./use-weigh-in";

/** The question as a person reads it. */
export function questionWords(question: Asking["questions"][number], zone: string): string {
  return question.question === "far-above-usual"
    ? `${formatKg(question.netGrams)} kg is far more than a usual bag of this point, which weighs ${formatKg(question.usualGrams)} kg. Nothing is saved yet.`
    : `This device's clock says ${whenWords(question.occurredAt as Instant, zone)}, which has not come yet. The ticket would be saved with the time of the program, ${whenWords(question.now as Instant, zone)}.`;
}
