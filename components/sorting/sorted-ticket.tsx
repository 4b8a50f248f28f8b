import Link from "next/link";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { LOSS_CAUSE_NAMES } from "@/lib/ledger/terms";
import type { StoredFraction } from "@/lib/sorting/queries/fractions";
import type { SortingPage } from "@/lib/sorting/queries/session-page";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import type { ColourLook } from "@/lib/stock/terms";
import { PATTERNS } from "../stock/patterns";
import { FractionRow } from "./fraction-row";

type Props = { session: SortingPage; when: string };

/** The rest between net and piles, named as the ledger names it. */
function restWords({ differenceGrams, cause }: SortingPage): string | null {
  if (differenceGrams === 0) return null;
  if (cause) return `${LOSS_CAUSE_NAMES[cause]}, lost`;
  return differenceGrams > 0 ? "Weighing difference, missing" : "Weighing difference, too much";
}

function Fraction({ fraction, at }: { fraction: StoredFraction; at: number }) {
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

/** What came of a session: every pile with its lot, the rejects, and what was over or missing. */
export function SortedTicket({ session, when }: Props) {
  const { fractions, byName, netGrams, differenceGrams, state } = session;
  const rest = restWords(session);
  const lots = [...new Set(fractions.flatMap(({ pile }) => (pile ? [pile.lotNumber] : [])))];
  const stands = state === "closed";
  return (
    <Ticket
      as="section"
      label="Sorted"
      padding="none"
      stub={
        <div className="px-4 py-4 wide:px-5">
          <p className={`text-sm font-bold ${stands ? "text-ok" : "text-soft"}`}>
            Sorted by {byName}
          </p>
          <p
            className={`font-mono text-3xl font-bold ${stands ? "" : "text-soft line-through decoration-2"}`}
          >
            {formatKg(netGrams)}
            <span className="font-body text-lg tracking-normal">&nbsp;kg</span>
          </p>
          <p className="text-sm text-soft">{when}</p>
        </div>
      }
    >
      <ul>
        {fractions.map((fraction, at) => (
          <Fraction key={at} fraction={fraction} at={at} />
        ))}
        {rest ? (
          <li className="flex justify-between gap-3 border-t border-rule px-4 py-3">
            <span>{rest}</span>
            <span className="font-mono font-bold">{formatKg(Math.abs(differenceGrams))}</span>
          </li>
        ) : null}
      </ul>
      {lots.length > 0 ? (
        <p className="flex flex-wrap gap-x-5 border-t border-rule px-4 py-1">
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
    </Ticket>
  );
}
