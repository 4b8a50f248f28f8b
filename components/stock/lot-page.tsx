import { Figure } from "@/components/ui/figure";
import { PageHeader } from "@/components/ui/page-header";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { LotMovement } from "@/lib/stock/contract/lots";
import type { LotView } from "@/lib/stock/queries/lots";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { LotBags } from "./lot-bags";
import { LotComposition } from "./lot-composition";
import { LotMovements } from "./lot-movements";
import { LotPlace } from "./lot-place";
import { PATTERNS } from "./patterns";

type Props = {
  lot: LotView;
  movements: { movements: LotMovement[]; next: string | null };
  timeZone: string;
  mayEdit: boolean;
};

/** One lot: what it is, where it stands, what is in it, and everything that ever happened to it. */
export function LotPage({ lot, movements, timeZone, mayEdit }: Props) {
  const day = (at: number) => formatDay(dayOf(instant(at), timeZone));
  return (
    <>
      <PageHeader
        title={`Lot ${lot.number}`}
        lead={`${pileName(lot.colourName, lot.polymer)}, ${pileDetail(lot)}`}
        back={{ href: "/stock", label: "Back to stock" }}
        figures={
          <Figure label="Held now" value={formatKg(lot.heldGrams)} unit="kg" align="right" />
        }
      />
      <div className="grid gap-4 rail:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <Ticket
          as="section"
          label="This lot"
          stub={
            <div className="flex items-center gap-4">
              <PileSwatch
                hex={lot.colourHex}
                pattern={PATTERNS[lot.colourLook]}
                seed={lot.number}
              />
              <div className="min-w-0">
                <p className="font-heading text-xl font-bold">
                  {pileName(lot.colourName, lot.polymer)}
                </p>
                <p className="font-mono text-sm">Label {formatCode(lot.labelCode)}</p>
              </div>
            </div>
          }
        >
          <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-5 gap-y-1.5">
            {[
              ["Polymer", POLYMER_NAMES[lot.polymer].name],
              ["Opened", day(lot.openedAt)],
              [
                "State",
                lot.closedAt === null ? "Open: piles go here" : `Closed ${day(lot.closedAt)}`,
              ],
            ].map(([term, words]) => (
              <div key={term} className="contents">
                <dt className="text-soft">{term}</dt>
                <dd className="font-bold">{words}</dd>
              </div>
            ))}
          </dl>
          <LotPlace number={lot.number} place={lot.place} mayEdit={mayEdit} />
        </Ticket>
        <LotComposition lot={lot} />
      </div>
      <LotBags bags={lot.bags} count={lot.bagCount} timeZone={timeZone} />
      <LotMovements number={lot.number} page={movements} timeZone={timeZone} />
    </>
  );
}
