/**
 * Invariant: free = on the shelf − reserved, in every cell and in every sum, and the sums of the drawn rows
 * are the sum of all cells; a polymer or colour that holds something is never left out of the drawing.
 */
import type { PolymerAnswer } from "@/lib/core/plastics";
import type { Stock, StockCell, StockColour } from "../contract/stock";

export type ShelfRow = {
  polymer: PolymerAnswer;
  /** One for each drawn colour, in the order of the columns; null where nothing is held. */
  cells: (StockCell | null)[];
  grams: number;
  reservedGrams: number;
};

export type Shelf = {
  columns: StockColour[];
  rows: ShelfRow[];
  grams: number;
  reservedGrams: number;
  freeGrams: number;
  /** The fullest cell; wells are filled in proportion to it. */
  fullestGrams: number;
};

/** The usual stock of a shed: drawn also when it holds nothing, so that the shelf keeps its shape. */
const ALWAYS: readonly PolymerAnswer[] = ["PE-HD", "PP", "PE-LD", "PS"];
/** The rest, drawn when something is held; what can never be heated comes last. */
const WHEN_HELD: readonly PolymerAnswer[] = [
  "PET",
  "ABS",
  "PLA",
  "PA",
  "PC",
  "O",
  "PVC",
  "mixed",
  "not-sure",
];

/**
 * Lays the cells out as the shelf is drawn: polymers down, colours across.
 *
 * @param stock as the stock endpoint gives it; a colour missing from its palette gets a column at the end
 */
export function layOutShelf(stock: Pick<Stock, "cells" | "colours">): Shelf {
  const byPolymer = new Map<PolymerAnswer, Map<string, StockCell>>();
  const inUse = new Set<string>();
  for (const cell of stock.cells) {
    let row = byPolymer.get(cell.polymer);
    if (!row) {
      row = new Map<string, StockCell>();
      byPolymer.set(cell.polymer, row);
    }
    row.set(cell.colourCode, cell);
    inUse.add(cell.colourCode);
  }
  const known = new Set(stock.colours.map((colour) => colour.code));
  const columns = [
    ...stock.colours.filter((colour) => inUse.has(colour.code)),
    ...[...inUse]
      .filter((code) => !known.has(code))
      .map((code): StockColour => ({ code, name: code, hex: "#8d9490", look: "solid" })),
  ];
  const polymers = [...ALWAYS, ...WHEN_HELD.filter((polymer) => byPolymer.has(polymer))];
  const rows = polymers.map((polymer): ShelfRow => {
    const held = byPolymer.get(polymer);
    const cells = columns.map((colour) => held?.get(colour.code) ?? null);
    return {
      polymer,
      cells,
      grams: cells.reduce((sum, cell) => sum + (cell?.grams ?? 0), 0),
      reservedGrams: cells.reduce((sum, cell) => sum + (cell?.reservedGrams ?? 0), 0),
    };
  });
  const grams = rows.reduce((sum, row) => sum + row.grams, 0);
  const reservedGrams = rows.reduce((sum, row) => sum + row.reservedGrams, 0);
  return {
    columns,
    rows,
    grams,
    reservedGrams,
    freeGrams: grams - reservedGrams,
    fullestGrams: stock.cells.reduce((most, cell) => Math.max(most, cell.grams), 0),
  };
}
