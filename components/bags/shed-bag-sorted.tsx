import Link from "next/link";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import { LOSS_CAUSE_NAMES } from "@/lib/ledger/terms";
import type { SortedBag } from "@/lib/sorting/contract/sortings";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import type { ColourLook } from "@/lib/stock/terms";
import { FractionRow } from "../sorting/fraction-row";
import { PATTERNS } from "../stock/patterns";

/** What came out of a bag on the sorting table, with the lots it went into. */
export function ShedBagSorted({ sorted, timeZone }: { sorted: SortedBag; timeZone: string }) {
  const { sortingId, fractions, differenceGrams, cause, byName, recordedAt } = sorted;
  const lots = [...new Set(fractions.flatMap(({ pile }) => (pile ? [pile.lotNumber] : [])))];
  return (
    <Ticket
      as="section"
      label="Sorted"
      padding="none"
      stub={
        <div className="px-4 py-4 wide:px-5">
          <h2 className="text-lg">Sorted</h2>
          <p className="text-sm text-soft">
            {formatDay(dayOf(instant(recordedAt), timeZone))}, {byName}
          </p>
          <Link
            href={`/sorting/sessions/${sortingId}`}
            className="link -mb-2 inline-flex min-h-11 items-center text-sm font-bold"
          >
            See the sorting
          </Link>
        </div>
      }
    >
      <ul>
        {fractions.map(({ pile, rejectName, netGrams }, at) => (
          <FractionRow
            key={at}
            name={pile ? pileName(pile.colourName, pile.polymer) : "Reject"}
            detail={
              pile ? `${pileDetail(pile)}, lot ${pile.lotNumber}` : (rejectName ?? "").toLowerCase()
            }
            kg={formatKg(netGrams)}
            hex={pile?.colourHex ?? null}
            pattern={pile ? PATTERNS[pile.colourLook as ColourLook] : "reject"}
            seed={at + 1}
          />
        ))}
        {differenceGrams === 0 ? null : (
          <li className="flex justify-between gap-3 px-4 py-3">
            <span>{cause ? `${LOSS_CAUSE_NAMES[cause]}, lost` : "Weighing difference"}</span>
            <span className="font-mono font-bold">
              {formatKg(differenceGrams)}
              <span className="sr-only"> kg</span>
            </span>
          </li>
        )}
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
