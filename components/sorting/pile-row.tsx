"use client";

import { formatKg } from "@/lib/core/mass";
import { FORM_NAMES, WASH_NAMES } from "@/lib/core/plastics";
import { pileName } from "@/lib/stock/rules/material-words";
import { PATTERNS } from "../stock/patterns";
import type { DeskLists } from "../weighing/use-desk-lists";
import { netOf, type PileDraft } from "./draft";
import { FractionRow } from "./fraction-row";
import { materialOf, useOpenLots } from "./use-table";

type Props = {
  pile: PileDraft;
  /** Its place on the table, from 0. */
  at: number;
  lists: DeskLists;
  error?: string | undefined;
  onOpen?: () => void;
};

/** "to lot 118", "to a new lot"; null while that is not known. */
function lotWords(chosen: PileDraft["lot"], first: number | null | undefined): string | null {
  if (chosen === "new") return "to a new lot";
  if (chosen !== null) return `to lot ${chosen}`;
  if (first === undefined) return null;
  return first === null ? "new lot" : `to lot ${first}`;
}

/** One pile on the table, with the lot that it joins. */
export function PileRow({ pile, at, lists, error, onOpen }: Props) {
  const lots = useOpenLots(materialOf(pile));
  const colour = lists.colours.find(({ code }) => code === pile.colourCode);
  const net = netOf(pile.reading, lists.containers);
  const first = lots.data ? (lots.data[0]?.number ?? null) : undefined;
  const words = [
    FORM_NAMES[pile.form].toLowerCase(),
    ...(pile.wash === "as-received" ? [] : [WASH_NAMES[pile.wash].toLowerCase()]),
    lotWords(pile.lot, first),
  ];
  return (
    <FractionRow
      name={pile.polymer === "" ? "Pile" : pileName(colour?.name ?? "Colour?", pile.polymer)}
      detail={words.filter((word) => word !== null).join(", ")}
      kg={net === null ? null : formatKg(net)}
      hex={colour?.hex ?? null}
      pattern={colour ? PATTERNS[colour.look] : "plain"}
      seed={at + 1}
      error={error}
      {...(onOpen ? { onOpen } : {})}
    />
  );
}
