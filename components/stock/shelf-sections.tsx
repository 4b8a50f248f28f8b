import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { StockFilter } from "@/lib/stock/contract/stock";
import type { Shelf } from "@/lib/stock/rules/shelf";
import { ShelfWell } from "./shelf-well";

/** The shelf on a phone: one section a polymer, only what is held, each colour with its name. */
export function ShelfSections({ shelf, filter }: { shelf: Shelf; filter: StockFilter }) {
  return (
    <div className="grid gap-5 wide:hidden">
      {shelf.rows
        .filter((row) => row.grams > 0)
        .map((row) => {
          const { name, resinCode } = POLYMER_NAMES[row.polymer];
          return (
            <section key={row.polymer} aria-label={name}>
              <h2 className="mb-2 flex items-baseline gap-2.5 border-b-2 border-ink pb-1.5 text-lg">
                {resinCode === null ? null : <span className="font-mono text-xl">{resinCode}</span>}
                <span>{name}</span>
                <span className="ml-auto font-mono text-base whitespace-nowrap">
                  {formatKg(row.grams, 2)}
                  <span className="font-body text-sm"> kg</span>
                </span>
              </h2>
              <ul className="grid grid-cols-3 gap-2">
                {row.cells.map((cell, at) => {
                  const colour = shelf.columns[at];
                  return cell && colour ? (
                    <li key={colour.code} className="min-w-0">
                      <ShelfWell
                        polymer={row.polymer}
                        colour={colour}
                        cell={cell}
                        fullestGrams={shelf.fullestGrams}
                        filter={filter}
                        className="h-20"
                      />
                      <span aria-hidden className="mt-1 block text-xs font-bold text-soft">
                        {colour.name}
                      </span>
                    </li>
                  ) : null;
                })}
              </ul>
            </section>
          );
        })}
    </div>
  );
}
