"use client";

import { SelectField } from "@/components/ui/select-field";
import { formatKg } from "@/lib/core/mass";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { PileDraft } from "./draft";
import { materialOf, useOpenLots } from "./use-table";

type Props = { pile: PileDraft; onLot: (lot: PileDraft["lot"]) => void };

const lotName = ({ number, heldGrams, place }: LotSummary): string =>
  `Lot ${number}, ${formatKg(heldGrams)} kg${place ? `, ${place}` : ""}`;

/** Which lot a pile joins: by itself the one that is open, or another, or a new one. */
export function LotField({ pile, onLot }: Props) {
  const material = materialOf(pile);
  const { data: lots, isError } = useOpenLots(material);
  if (material === null) return null;
  const [first, ...others] = lots ?? [];
  const gone =
    lots !== undefined && typeof pile.lot === "number"
      ? pile.lot !== pile.ownLot && !lots.some(({ number }) => number === pile.lot)
      : false;
  const byItself =
    lots === undefined
      ? "The one that is open for it"
      : first
        ? lotName(first)
        : "A new lot, because none is open for it";
  return (
    <SelectField
      label="Goes to"
      value={pile.lot ?? ""}
      onChange={({ target: { value } }) =>
        onLot(value === "" ? null : value === "new" ? "new" : Number(value))
      }
      error={
        gone
          ? `Lot ${pile.lot ?? ""} is not open for such piles. Choose another, or a new one.`
          : undefined
      }
      hint={isError ? "The lots could not be read; it is said again when it is saved." : undefined}
    >
      <option value="">{byItself}</option>
      {others.map((lot) => (
        <option key={lot.number} value={lot.number}>
          {lotName(lot)}
        </option>
      ))}
      {typeof pile.lot === "number" && !others.some(({ number }) => number === pile.lot) ? (
        <option value={pile.lot}>Lot {pile.lot}</option>
      ) : null}
      {first || pile.lot === "new" ? <option value="new">A new lot</option> : null}
    </SelectField>
  );
}
