import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { StockFilter } from "@/lib/stock/contract/stock";
import type { Shelf } from "@/lib/stock/rules/shelf";
import { ShelfWell } from "./shelf-well";

/** The shelf as a table, from 700 px: polymers down, colours across. */
export function ShelfGrid({ shelf, filter }: { shelf: Shelf; filter: StockFilter }) {
  return (
    <div
      role="region"
      aria-label="Stock by polymer and colour"
      tabIndex={0}
      className="overflow-x-auto max-wide:hidden"
    >
      <table className="w-full table-fixed border-separate border-spacing-[3px] text-left">
        <caption className="sr-only">Kilograms on the shelf by polymer and colour</caption>
        <colgroup>
          <col className="w-19" />
          {shelf.columns.map((colour) => (
            <col key={colour.code} className="w-18" />
          ))}
          <col className="w-21" />
        </colgroup>
        <thead>
          <tr className="align-bottom text-xs text-soft">
            <th scope="col" className="sticky left-0 z-10 bg-paper">
              <span className="sr-only">Polymer</span>
            </th>
            {shelf.columns.map((colour) => (
              <th key={colour.code} scope="col" className="pb-1 font-bold hyphens-auto">
                {colour.name}
              </th>
            ))}
            <th scope="col" className="pb-1 text-right font-bold">
              Total
            </th>
          </tr>
        </thead>
        <tbody>
          {shelf.rows.map((row) => {
            const { name, resinCode } = POLYMER_NAMES[row.polymer];
            return (
              <tr key={row.polymer}>
                <th scope="row" className="sticky left-0 z-10 bg-paper pr-2">
                  {resinCode === null ? (
                    <span className="text-base font-bold">{name}</span>
                  ) : (
                    <>
                      <span className="block font-mono text-xl font-bold">{resinCode}</span>
                      <span className="block text-xs font-bold text-soft">{name}</span>
                    </>
                  )}
                </th>
                {shelf.columns.map((colour, at) => (
                  <td key={colour.code} className="p-0">
                    <ShelfWell
                      polymer={row.polymer}
                      colour={colour}
                      cell={row.cells[at] ?? null}
                      fullestGrams={shelf.fullestGrams}
                      filter={filter}
                    />
                  </td>
                ))}
                <td className="text-right font-mono text-base font-bold text-soft">
                  {formatKg(row.grams, 2)}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
