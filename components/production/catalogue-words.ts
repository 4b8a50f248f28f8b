/** How figures of the catalogue are written in its tables and dialogs. */
import { formatMeasure } from "@/lib/core/measure";
import { POLYMER_NAMES, type PolymerAnswer } from "@/lib/core/plastics";
import type { Piece } from "@/lib/production/contract/catalogue";
import type { SheetSize } from "@/lib/production/rules/feedstock";

export const polymerName = (polymer: PolymerAnswer): string => POLYMER_NAMES[polymer].name;

/** The sheet that a piece is, or is cut from; null for a moulded one. */
export function pieceSheet({ lengthUm, widthUm, thicknessUm }: Piece): SheetSize | null {
  return lengthUm === null || widthUm === null || thicknessUm === null
    ? null
    : { lengthUm, widthUm, thicknessUm };
}

/** A mass of one piece as its scale shows it, "26.24"; never more than three decimals of a gram. */
export const gramsOf = (milligrams: number): string => formatMeasure(milligrams, "mass");

/** "7 min 30 s", "45 s", "2 h 5 min": to the second, as it was typed; a figure stays with its unit. */
export function exactTime(seconds: number): string {
  const parts = [
    [Math.floor(seconds / 3600), "h"],
    [Math.floor((seconds % 3600) / 60), "min"],
    [seconds % 60, "s"],
  ] as const;
  const said = parts.filter(([count]) => count > 0).map(([count, unit]) => `${count}\u00a0${unit}`);
  return said.length > 0 ? said.join(" ") : "0\u00a0s";
}

/** A count with its thousands apart, "12 400". */
export const countWords = (count: number): string =>
  String(count).replace(/\B(?=(\d{3})+$)/g, "\u202f");
