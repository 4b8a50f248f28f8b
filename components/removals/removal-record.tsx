import Link from "next/link";
import { QueryProvider } from "@/components/forms/query-provider";
import { ButtonLink } from "@/components/ui/button-link";
import { TONE_TEXT } from "@/components/ui/figure";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg, formatMilligrams } from "@/lib/core/mass";
import { dayOf, formatClock, formatDay, type Day, type Instant } from "@/lib/core/time";
import { BASIS_NAMES } from "@/lib/ledger/terms";
import type { RemovalView } from "@/lib/removals/queries/removal-page";
import { RecordPhotos } from "../uploads/record-photos";
import { ReceiptTicket } from "./receipt-ticket";
import { RemovalHistory } from "./removal-history";
import { differenceWords, stateWords } from "./removal-words";
import { UndoRecord } from "./undo-record";

type Props = {
  removal: RemovalView;
  today: Day;
  timeZone: string;
  mayRecord: boolean;
  helperId: string;
  mayRemovePhotos: boolean;
};

/** One removal: its ticket, its receipt, and everything that happened to it. */
export function RemovalRecord({
  removal,
  today,
  timeZone,
  mayRecord,
  helperId,
  mayRemovePhotos,
}: Props) {
  const when = (at: Instant) => formatDay(dayOf(at, timeZone));
  const live = removal.receipts.find(({ state }) => state === "posted");
  const { words, tone } = stateWords({ ...removal, receiptNumber: live?.number ?? null });
  const facts: [string, string][] = [
    ["From", removal.source === "reject-bin" ? "Reject bin" : "Stock"],
    ["Day", when(removal.occurredAt)],
    ["Receiver", withNumber(removal.receiverName, removal.receiverNumber)],
    ["Carrier", withNumber(removal.carrierName, removal.carrierNumber)],
    ["Note or ticket", removal.noteNumber],
    // Settings and exports show waste codes; here they stand for whoever fills in the papers.
    ["Code", mayRecord ? removal.wasteCode : ""],
    ["Weight", weightWords(removal)],
    ["Recorded by", `${removal.byName}, ${when(removal.recordedAt)}`],
  ];
  return (
    <>
      <PageHeader
        title={`Taken away on ${when(removal.occurredAt)}`}
        back={{ href: "/removals", label: "Back to what was taken away" }}
      />
      <div className="grid items-start gap-4 rail:grid-cols-2">
        <Ticket
          as="section"
          label="This removal"
          stub={
            <>
              <p className={`mb-2 font-heading text-xl font-bold ${TONE_TEXT[tone]}`}>{words}</p>
              <WeightDisplay label="Taken away" value={formatKg(removal.grams)} largest={56} />
              {removal.differenceGrams === 0 ? null : (
                <p className="mt-2">
                  {differenceWords(
                    removal.differenceGrams,
                    formatKg(Math.abs(removal.differenceGrams)),
                  )}
                  , as difference.
                </p>
              )}
            </>
          }
        >
          <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-5 gap-y-1.5">
            {facts
              .filter(([, said]) => said !== "")
              .map(([term, said]) => (
                <div key={term} className="contents">
                  <dt className="text-soft">{term}</dt>
                  <dd className="font-bold wrap-anywhere">{said}</dd>
                </div>
              ))}
          </dl>
          {removal.lots.length > 0 ? (
            <ul className="mt-4 grid border-t border-rule pt-2">
              {removal.lots.map(({ number, name, grams }) => (
                <li key={number} className="flex items-center justify-between gap-4">
                  <Link
                    href={`/stock/lots/${number}`}
                    className="link inline-flex min-h-11 items-center"
                  >
                    Lot {number}, {name}
                  </Link>
                  <span className="font-mono">{formatKg(grams)}</span>
                </li>
              ))}
            </ul>
          ) : null}
          {mayRecord && removal.state === "posted" ? (
            <div className="mt-4 flex flex-wrap gap-2.5">
              {removal.undoUntil === null ? null : (
                <UndoRecord removalId={removal.id} until={removal.undoUntil} />
              )}
              <ButtonLink href={`/removals/${removal.id}/correct`} variant="quiet" size="small">
                Correct
              </ButtonLink>
            </div>
          ) : null}
        </Ticket>
        <div className="grid min-w-0 gap-4">
          {removal.route === "passed-on" && removal.state === "posted" ? (
            <ReceiptTicket
              removal={removal}
              receipt={live ?? null}
              today={today}
              timeZone={timeZone}
              mayRecord={mayRecord}
            />
          ) : null}
          <QueryProvider>
            <RecordPhotos
              kind="removal"
              id={removal.id}
              label="Photos of this removal"
              facts={{
                what: `Taken away from ${removal.source === "reject-bin" ? "the reject bin" : "stock"}`,
                grams: removal.grams,
                day: dayOf(removal.occurredAt, timeZone),
                timeZone,
              }}
              helperId={helperId}
              mayRemove={mayRemovePhotos}
            />
          </QueryProvider>
        </div>
      </div>
      <RemovalHistory
        removal={removal}
        when={(at) => `${when(at)}, ${formatClock(at, timeZone)}`}
      />
    </>
  );
}

const withNumber = (name: string, number: string): string =>
  [name, number].filter((part) => part !== "").join(", ");

function weightWords(removal: RemovalView): string {
  const { basis, scaleName, grossMilligrams, tareMilligrams } = removal;
  const words = BASIS_NAMES[basis];
  if (scaleName === null || grossMilligrams === null) return words;
  const less = tareMilligrams ? ` less ${formatMilligrams(tareMilligrams)} kg tare` : "";
  return `${words}: ${scaleName}, ${formatMilligrams(grossMilligrams)} kg${less}`;
}
