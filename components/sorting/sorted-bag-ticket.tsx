"use client";

import { useQueryClient } from "@tanstack/react-query";
import Link from "next/link";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { LOSS_CAUSE_NAMES } from "@/lib/ledger/terms";
import type {
  BagToSort,
  SortedBag,
  SortedFraction,
  undoSortingEndpoint,
} from "@/lib/sorting/contract";
import { UNDO_SORTING_ADDRESS } from "@/lib/sorting/terms";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import type { ColourLook } from "@/lib/stock/terms";
import { PATTERNS } from "../stock/patterns";
import { FractionRow } from "./fraction-row";

type Props = { bag: BagToSort; sorted: SortedBag };

/** The rest between net and piles, named as the ledger names it. */
function restWords({ differenceGrams, cause }: SortedBag): string | null {
  if (differenceGrams === 0) return null;
  if (cause) return `${LOSS_CAUSE_NAMES[cause]}, lost`;
  return differenceGrams > 0 ? "Weighing difference, missing" : "Weighing difference, too much";
}

function Fraction({ fraction, at }: { fraction: SortedFraction; at: number }) {
  const { pile } = fraction;
  return (
    <FractionRow
      name={pile ? pileName(pile.colourName, pile.polymer) : "Reject"}
      detail={
        pile
          ? `${pileDetail(pile)}, in lot ${pile.lotNumber}`
          : (fraction.rejectName ?? "").toLowerCase()
      }
      kg={formatKg(fraction.netGrams)}
      hex={pile?.colourHex ?? null}
      pattern={pile ? PATTERNS[pile.colourLook as ColourLook] : "reject"}
      seed={at + 1}
    />
  );
}

/** How a bag was sorted; for ten minutes whoever saved it can take it back. */
export function SortedBagTicket({ bag, sorted }: Props) {
  const cache = useQueryClient();
  const undo = useCommand<typeof undoSortingEndpoint>(UNDO_SORTING_ADDRESS);
  const rest = restWords(sorted);
  const lots = [...new Set(sorted.fractions.flatMap(({ pile }) => (pile ? [pile.lotNumber] : [])))];

  async function takeBack() {
    const result = await undo.send({ id: sorted.sortingId });
    if (result.kind === "done") await cache.invalidateQueries();
  }

  return (
    <div className="grid gap-4 rail:max-w-3xl">
      <Ticket
        as="section"
        label="Sorted"
        padding="none"
        stub={
          <div className="px-4 py-4 wide:px-5">
            <p className="text-sm font-bold text-ok">Sorted by {sorted.byName}</p>
            <p className="font-mono text-3xl font-bold">
              {formatKg(sorted.netGrams)} <span className="font-body text-lg">kg</span>
            </p>
            {bag.pointName ? <p className="text-soft">{bag.pointName}</p> : null}
          </div>
        }
      >
        <ul>
          {sorted.fractions.map((fraction, at) => (
            <Fraction key={at} fraction={fraction} at={at} />
          ))}
          {rest ? (
            <li className="flex justify-between gap-3 border-t border-rule px-4 py-3">
              <span>{rest}</span>
              <span className="font-mono font-bold">
                {formatKg(Math.abs(sorted.differenceGrams))}
              </span>
            </li>
          ) : null}
        </ul>
      </Ticket>
      {lots.length > 0 ? (
        <p className="flex flex-wrap gap-x-5">
          {lots.map((number) => (
            <Link
              key={number}
              href={`/stock/lots/${number}`}
              className="link inline-flex min-h-11 items-center font-bold"
            >
              Lot {number}
            </Link>
          ))}
        </p>
      ) : null}
      {undo.problem || undo.unreachable ? (
        <Notice tone="bad" title="It was not undone" live="alert">
          {undo.problem?.detail ?? "The server did not answer. Try again in a moment."}
        </Notice>
      ) : null}
      <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
        <ButtonLink href="/sorting">Next bag</ButtonLink>
        {sorted.undoUntil !== null ? (
          <Button variant="quiet" onClick={() => void takeBack()} busy={undo.pending}>
            Undo this sorting
          </Button>
        ) : null}
      </div>
    </div>
  );
}
