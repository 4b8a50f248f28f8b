"use client";

import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { FORM_NAMES, WASH_NAMES } from "@/lib/core/plastics";
import type { RejectReason } from "@/lib/sorting/contract";
import { pileName } from "@/lib/stock/rules/material-words";
import { PATTERNS } from "../stock/patterns";
import type { DeskLists } from "../weighing/use-desk-lists";
import { netOf, type Draft, type PileDraft } from "./draft";
import type { Opened } from "./fraction-dialogs";
import { FractionRow } from "./fraction-row";
import { useOpenLots } from "./use-table";

type Props = {
  draft: Draft;
  lists: DeskLists;
  reasons: readonly RejectReason[];
  /** Refusals by field: "piles.0.reading.grossMilligrams". */
  errors: Readonly<Record<string, string>>;
  onOpen: (opened: Opened) => void;
};

/** What was weighed so far; a tap opens it again. */
export function FractionList({ draft, lists, reasons, errors, onOpen }: Props) {
  const lots = useOpenLots();
  const errorOf = (prefix: string): string | undefined =>
    Object.entries(errors).find(([field]) => field.startsWith(`${prefix}.`))?.[1];
  const kgOf = (reading: PileDraft["reading"]): string | null => {
    const net = netOf(reading, lists.containers);
    return net === null ? null : formatKg(net);
  };
  const whereTo = ({ polymer, kind, colourCode, form, wash }: PileDraft): string => {
    const number = lots.data?.get([polymer, kind, colourCode, form, wash].join("|"));
    const lot = lots.data ? (number === undefined ? "new lot" : `to lot ${number}`) : null;
    const words = [FORM_NAMES[form].toLowerCase()];
    if (wash !== "as-received") words.push(WASH_NAMES[wash].toLowerCase());
    if (lot) words.push(lot);
    return words.join(", ");
  };
  return (
    <Ticket as="section" label="On the table" padding="none">
      <ul>
        {draft.piles.map((pile, at) => {
          const colour = lists.colours.find(({ code }) => code === pile.colourCode);
          return (
            <FractionRow
              key={pile.id}
              name={
                pile.polymer === "" ? "Pile" : pileName(colour?.name ?? "Colour?", pile.polymer)
              }
              detail={whereTo(pile)}
              kg={kgOf(pile.reading)}
              hex={colour?.hex ?? null}
              pattern={colour ? PATTERNS[colour.look] : "plain"}
              seed={at + 1}
              error={errorOf(`piles.${at}`)}
              onOpen={() => onOpen({ kind: "pile", value: pile, isNew: false })}
            />
          );
        })}
        {draft.rejects.map((reject, at) => (
          <FractionRow
            key={reject.id}
            name="Reject"
            detail={
              reasons.find(({ code }) => code === reject.reason)?.name.toLowerCase() ?? "reason?"
            }
            kg={kgOf(reject.reading)}
            hex={null}
            pattern="reject"
            seed={at + 1}
            error={errorOf(`rejects.${at}`)}
            onOpen={() => onOpen({ kind: "reject", value: reject, isNew: false })}
          />
        ))}
      </ul>
    </Ticket>
  );
}
