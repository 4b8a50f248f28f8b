"use client";

import { memo } from "react";
import { ChoiceTiles, type Choice } from "@/components/ui/choice-tiles";
import { POLYMER_NAMES, type PolymerAnswer } from "@/lib/core/plastics";

/** The tile of the rare ones; tapped, it shows them. */
const RARE: readonly PolymerAnswer[] = ["PVC", "ABS", "PLA", "PA", "PC", "O"];
const RARE_TILE = "rare";

const TILES: readonly Choice[] = [
  { value: "mixed", big: "mix", label: "to sort" },
  { value: "PE-HD", big: "2", label: "HDPE" },
  { value: "PP", big: "5", label: "PP" },
  { value: "PET", big: "1", label: "PET" },
  { value: "PE-LD", big: "4", label: "LDPE" },
  { value: "PS", big: "6", label: "PS" },
  { value: RARE_TILE, big: "3, 7", label: "PVC, other" },
  { value: "not-sure", big: "?", label: "Not sure" },
];
const RARE_TILES: readonly Choice[] = RARE.map((polymer) => ({
  value: polymer,
  big: String(POLYMER_NAMES[polymer].resinCode),
  label: POLYMER_NAMES[polymer].name,
}));

type Props = {
  value: PolymerAnswer;
  onChoose(polymer: PolymerAnswer): void;
  error: string | undefined;
};

/** What the number in the triangle says; a bag starts as mixed. */
export const ResinTiles = memo(function ResinTiles({ value, onChoose, error }: Props) {
  const rare = RARE.includes(value);
  return (
    <div className="grid gap-2">
      <ChoiceTiles
        legend="Resin code"
        name="polymer"
        choices={TILES}
        value={rare ? RARE_TILE : value}
        onChoose={(tile) => onChoose(tile === RARE_TILE ? "O" : (tile as PolymerAnswer))}
        error={error}
      />
      {rare ? (
        <ChoiceTiles
          legend="Which of 3 and 7"
          hideLegend
          name="rare-polymer"
          columns={3}
          choices={RARE_TILES}
          value={value}
          onChoose={(polymer) => onChoose(polymer as PolymerAnswer)}
        />
      ) : null}
    </div>
  );
});
