import { seedOf } from "@/lib/core/random";
import Link from "next/link";
import { StockWell } from "@/components/ui/stock-well";
import type { PolymerAnswer } from "@/lib/core/plastics";
import type { StockCell, StockColour, StockFilter } from "@/lib/stock/contract/stock";
import { plateKg, wellWords } from "@/lib/stock/rules/well-words";
import { filterValues } from "./filter-query";
import { PATTERNS } from "./patterns";

type Props = {
  polymer: PolymerAnswer;
  colour: StockColour;
  cell: StockCell | null;
  fullestGrams: number;
  filter: StockFilter;
  className?: string;
};

/** One polymer in one colour; leads to its lots. */
export function ShelfWell({ polymer, colour, cell, fullestGrams, filter, className }: Props) {
  const well = (
    <StockWell
      label={wellWords(polymer, colour.name, cell)}
      kg={cell ? plateKg(cell.grams) : null}
      fill={cell && fullestGrams > 0 ? cell.grams / fullestGrams : 0}
      reserved={cell && cell.grams > 0 ? cell.reservedGrams / cell.grams : 0}
      hex={colour.hex}
      pattern={PATTERNS[colour.look]}
      seed={seedOf(polymer + colour.code)}
      className={className}
    />
  );
  if (!cell) return well;
  return (
    <Link
      href={{
        pathname: "/stock/lots",
        query: filterValues({ ...filter, polymer, colour: colour.code }),
      }}
      className="block rounded-control hover:outline-2 hover:outline-ink"
    >
      {well}
    </Link>
  );
}
