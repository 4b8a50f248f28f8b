import Link from "next/link";
import { QueryProvider } from "@/components/forms/query-provider";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { SortingPage } from "@/lib/sorting/queries/session-page";
import { whenWords } from "@/lib/weighing/rules";
import { LaterUsesList } from "../ledger/later-uses-list";
import { SessionFate } from "./session-fate";
import { SortAgain } from "./sort-again";
import { SortedTicket } from "./sorted-ticket";
import { SortingPhotos } from "./sorting-photos";
import { UndoSorting } from "./undo-sorting";

type Props = {
  session: SortingPage;
  timeZone: string;
  /** Whose session at the screen this is: photos that wait on a phone are sent in it only. */
  helperId: string;
  mayCorrect: boolean;
  mayRemovePhotos: boolean;
};

/** A sorting as it was saved, and everything that became of it. */
export function SessionRecord({ session, timeZone, helperId, mayCorrect, mayRemovePhotos }: Props) {
  const { id, bags, state, later, undoUntil, netGrams } = session;
  const [only] = bags;
  const title =
    bags.length === 1 && only ? `Sorting ${formatCode(only.code)}` : `Sorting ${bags.length} bags`;
  return (
    <QueryProvider>
      <PageHeader
        title={title}
        lead={[...new Set(bags.map(({ pointName }) => pointName ?? "No drop-off point"))].join(
          ", ",
        )}
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      <div className="grid items-start gap-4 rail:grid-cols-2">
        <div className="grid min-w-0 gap-4">
          <SessionFate session={session} timeZone={timeZone} />
          <SortedTicket session={session} when={whenWords(session.occurredAt, timeZone)} />
          <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
            {state === "undone" ? <SortAgain session={session} helperId={helperId} /> : null}
            <ButtonLink href="/sorting" variant={state === "undone" ? "quiet" : "act"}>
              Next bag
            </ButtonLink>
            {undoUntil === null ? null : <UndoSorting id={id} until={undoUntil} />}
            {mayCorrect && state === "closed" ? (
              <ButtonLink href={`/sorting/sessions/${id}/correct`} variant="quiet">
                Correct
              </ButtonLink>
            ) : null}
          </div>
        </div>
        <div className="grid min-w-0 gap-4">
          <section aria-label="Bags">
            <h2 className="mb-1.5 text-lg">
              {bags.length === 1 ? "The bag" : `${bags.length} bags, tipped together`}
            </h2>
            <Ticket padding="none">
              <ul>
                {bags.map((bag) => (
                  <li
                    key={bag.code}
                    className="flex items-center justify-between gap-3 border-b border-rule px-4 py-1 last:border-0"
                  >
                    <span className="min-w-0">
                      <Link
                        href={`/bags/${bag.code}`}
                        className="link inline-flex min-h-11 items-center font-mono font-bold tracking-tighter"
                      >
                        {formatCode(bag.code)}
                      </Link>
                      <span className="-mt-2 mb-1 block text-sm break-words text-soft">
                        {bag.pointName ?? "No drop-off point"}
                      </span>
                    </span>
                    <span className="font-mono font-bold whitespace-nowrap">
                      {formatKg(bag.netGrams)}
                      <span className="sr-only"> kg</span>
                    </span>
                  </li>
                ))}
              </ul>
            </Ticket>
            {bags.length > 1 ? (
              <p className="mt-1.5 text-sm text-soft">
                Where the piles came from is shared by weight. The rejects are shared too, and count
                for no drop-off point.
              </p>
            ) : null}
          </section>
          {later.count > 0 && state !== "undone" ? (
            <Notice tone="info" title="Used since">
              <LaterUsesList later={later} timeZone={timeZone} />
            </Notice>
          ) : null}
          <SortingPhotos
            id={id}
            helperId={helperId}
            timeZone={timeZone}
            what={bags.length === 1 && only ? `Bag ${formatCode(only.code)}` : "Bags on the table"}
            grams={netGrams}
            mayRemove={mayRemovePhotos}
          />
        </div>
      </div>
    </QueryProvider>
  );
}
