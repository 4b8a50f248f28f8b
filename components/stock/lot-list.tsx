import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { LotSummary } from "@/lib/stock/contract/lots";
import { endWords } from "@/lib/stock/rules/lot-ends";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { PATTERNS } from "./patterns";

type Props = { lots: readonly LotSummary[]; timeZone: string };

/** Lots, each leading to its page. */
export function LotList({ lots, timeZone }: Props) {
  return (
    <DataTable
      caption="Lots"
      rows={lots}
      rowKey={(lot) => lot.number}
      empty={
        <EmptyState title="No lot is like this now">
          What is sorted goes to a lot of its polymer, colour, kind and form; the lot opens by
          itself. Emptied lots are found with “Which: all”.
        </EmptyState>
      }
      columns={[
        {
          key: "number",
          header: "Lot",
          head: true,
          cell: (lot) => (
            <Link
              href={`/stock/lots/${lot.number}`}
              className="link inline-flex min-h-11 items-center gap-3 font-bold"
            >
              <PileSwatch
                hex={lot.colourHex}
                pattern={PATTERNS[lot.colourLook]}
                seed={lot.number}
                size={24}
              />
              Lot {lot.number}
            </Link>
          ),
        },
        {
          key: "material",
          header: "What",
          cell: (lot) => (
            <>
              <span className="block font-bold">{pileName(lot.colourName, lot.polymer)}</span>
              <span className="block text-sm text-soft">{pileDetail(lot)}</span>
            </>
          ),
        },
        {
          key: "place",
          header: "Place",
          cell: (lot) => [lot.place, lot.containerName].filter(Boolean).join(", ") || "Not said",
        },
        {
          key: "state",
          header: "State",
          cell: (lot) =>
            lot.closedAt === null ? (
              "Open"
            ) : (
              <>
                Closed
                {lot.closedFor === null ? null : (
                  <span className="block text-sm text-soft">{endWords(lot.closedFor)}</span>
                )}
              </>
            ),
        },
        {
          key: "opened",
          header: "Opened",
          cell: (lot) => formatDay(dayOf(instant(lot.openedAt), timeZone)),
        },
        { key: "kg", header: "kg", align: "figure", cell: (lot) => formatKg(lot.heldGrams) },
      ]}
    />
  );
}
