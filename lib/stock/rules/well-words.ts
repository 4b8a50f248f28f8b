/** Invariant: what stands in a well's small plate never claims more than there is, and never says nothing is there when something is. */
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES, type PolymerAnswer } from "@/lib/core/plastics";

/** Kilograms for a plate of five characters: "18.58", "123.4", "1204"; under 10 g "<0.01". */
export function plateKg(grams: number): string {
  if (grams > 0 && grams < 10) return "<0.01";
  if (grams >= 999_950) return formatKg(grams, 0);
  return formatKg(grams, grams >= 99_995 ? 1 : 2);
}

/** What a screen reader says of a well: "HDPE, Blue: 5.790 kg, 1.200 kg of it reserved". */
export function wellWords(
  polymer: PolymerAnswer,
  colourName: string,
  cell: { grams: number; reservedGrams: number } | null,
): string {
  const what = `${POLYMER_NAMES[polymer].name}, ${colourName}`;
  if (!cell) return `${what}: nothing`;
  const reserved =
    cell.reservedGrams > 0 ? `, ${formatKg(cell.reservedGrams)} kg of it reserved` : "";
  return `${what}: ${formatKg(cell.grams)} kg${reserved}`;
}
