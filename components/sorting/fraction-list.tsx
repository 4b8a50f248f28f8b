"use client";

import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import type { RejectReason } from "@/lib/sorting/contract/sortings";
import type { DeskLists } from "../weighing/use-desk-lists";
import { netOf, type Draft } from "./draft";
import type { Opened } from "./fraction-dialogs";
import { FractionRow } from "./fraction-row";
import { PileRow } from "./pile-row";

type Props = {
  draft: Draft;
  lists: DeskLists;
  reasons: readonly RejectReason[];
  /** Refusals by field: "piles.0.reading.grossMilligrams". */
  errors: Readonly<Record<string, string>>;
  /** null: it is only looked at. */
  onOpen: ((opened: Opened) => void) | null;
  label?: string;
};

/** What was weighed so far; a tap opens it again. */
export function FractionList({
  draft,
  lists,
  reasons,
  errors,
  onOpen,
  label = "On the table",
}: Props) {
  const errorOf = (prefix: string): string | undefined =>
    Object.entries(errors).find(([field]) => field.startsWith(`${prefix}.`))?.[1];
  return (
    <Ticket as="section" label={label} padding="none">
      <ul>
        {draft.piles.map((pile, at) => (
          <PileRow
            key={pile.id}
            pile={pile}
            at={at}
            lists={lists}
            error={errorOf(`piles.${at}`)}
            {...(onOpen
              ? { onOpen: () => onOpen({ kind: "pile", value: pile, isNew: false }) }
              : {})}
          />
        ))}
        {draft.rejects.map((reject, at) => {
          const net = netOf(reject.reading, lists.containers);
          return (
            <FractionRow
              key={reject.id}
              name="Reject"
              detail={
                reasons.find(({ code }) => code === reject.reason)?.name.toLowerCase() ?? "reason?"
              }
              kg={net === null ? null : formatKg(net)}
              hex={null}
              pattern="reject"
              seed={at + 1}
              error={errorOf(`rejects.${at}`)}
              {...(onOpen
                ? { onOpen: () => onOpen({ kind: "reject", value: reject, isNew: false }) }
                : {})}
            />
          );
        })}
      </ul>
    </Ticket>
  );
}
