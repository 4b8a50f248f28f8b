import { Figure } from "@/components/ui/figure";
import { PageHeader } from "@/components/ui/page-header";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { LotMovement } from "@/lib/stock/contract/lots";
import type { CountView } from "@/lib/stock/contract/counts";
import type { MoveView } from "@/lib/stock/contract/moves";
import type { LotView } from "@/lib/stock/queries/lots";
import { endWords } from "@/lib/stock/rules/lot-ends";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { LotActions } from "./lot-actions";
import { LotBags } from "./lot-bags";
import { LotComposition } from "./lot-composition";
import { LotContainer } from "./lot-container";
import { LotMovements } from "./lot-movements";
import { LotPhotos } from "./lot-photos";
import { LotPlace } from "./lot-place";
import { LotRecords } from "./lot-records";
import { PATTERNS } from "./patterns";

type Props = {
  lot: LotView;
  movements: { movements: LotMovement[]; next: string | null };
  counts: CountView[];
  moves: MoveView[];
  timeZone: string;
  /** Whole days since it was opened. */
  ageDays: number;
  mayEdit: boolean;
  may: {
    count: boolean;
    identify: boolean;
    move: boolean;
    step: boolean;
    remove: boolean;
    correct: boolean;
  };
  /** Whose session this is: photos that wait on a phone are sent in it only. */
  helperId: string;
  mayRemovePhotos: boolean;
};

function ageWords(days: number): string {
  if (days === 0) return "today";
  return days === 1 ? "yesterday" : `${days} days ago`;
}

function stateWords(
  { closedAt, closedFor }: Pick<LotView, "closedAt" | "closedFor">,
  day: (at: number) => string,
): string {
  if (closedAt === null) return "Open: piles go here";
  const why = endWords(closedFor);
  return why === null ? `Closed ${day(closedAt)}` : `Closed ${day(closedAt)}: ${why}`;
}

/** One lot: what it is, where it stands, what is in it, and everything that ever happened to it. */
export function LotPage({
  lot,
  movements,
  counts,
  moves,
  timeZone,
  ageDays,
  mayEdit,
  may,
  helperId,
  mayRemovePhotos,
}: Props) {
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
      <LotActions lot={lot} may={{ ...may, close: mayEdit }} />
      <div className="grid items-start gap-x-4 gap-y-6 rail:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <div className="grid min-w-0 gap-6">
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
                ["Opened", `${day(lot.openedAt)}, ${ageWords(ageDays)}`],
                ["State", stateWords(lot, day)],
              ].map(([term, words]) => (
                <div key={term} className="contents">
                  <dt className="text-soft">{term}</dt>
                  <dd className="font-bold">{words}</dd>
                </div>
              ))}
            </dl>
            <LotPlace number={lot.number} place={lot.place} mayEdit={mayEdit} />
            {mayEdit ? (
              <LotContainer
                number={lot.number}
                containerId={lot.containerId}
                containerName={lot.containerName}
              />
            ) : null}
          </Ticket>
          <div className="min-w-0">
            <LotPhotos
              lotId={lot.lotId}
              lot={lot}
              timeZone={timeZone}
              helperId={helperId}
              mayRemove={mayRemovePhotos}
            />
          </div>
        </div>
        <LotComposition lot={lot} />
      </div>
      <LotRecords
        counts={counts}
        moves={moves}
        number={lot.number}
        timeZone={timeZone}
        mayCorrect={may.correct}
      />
      <LotBags bags={lot.bags} more={lot.moreBags} timeZone={timeZone} />
      <LotMovements number={lot.number} page={movements} timeZone={timeZone} />
    </>
  );
}
