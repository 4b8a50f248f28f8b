import Link from "next/link";
import { DataTable } from "@/components/ui/data-table";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { day, dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import { ENTRY_KINDS, type EntryKind } from "@/lib/ledger/terms";
import type { LotMovement } from "@/lib/stock/contract/lots";

type Props = {
  number: number;
  page: { movements: readonly LotMovement[]; next: string | null };
  timeZone: string;
};

const WORDS: Record<EntryKind, string> = {
  "weigh-in": "Weighed in as one kind",
  sort: "Sorted into it",
  step: "Step",
  identify: "Identified",
  move: "Moved",
  count: "Counted",
  opening: "Counted in on the first day",
  draw: "Taken out",
  return: "Put back",
  finish: "Came from a run",
  cut: "Cutting",
  "take-back": "Pieces taken back",
  removal: "Taken away",
  receipt: "Receipt",
  import: "Imported",
  reversal: "Taken back",
  settling: "Settled after a correction",
};

const isKind = (kind: string): kind is EntryKind => ENTRY_KINDS.some((known) => known === kind);

function Cause({ movement }: { movement: LotMovement }) {
  const words = isKind(movement.kind) ? WORDS[movement.kind] : movement.kind;
  return (
    <>
      <span className="block">{words}</span>
      <span className="block text-sm text-soft">
        Entry {movement.entryId}
        {movement.reverses === null ? "" : `, takes back entry ${movement.reverses}`}
      </span>
    </>
  );
}

/** Everything that ever went into or out of a lot, newest first. */
export function LotMovements({ number, page, timeZone }: Props) {
  return (
    <section className="mt-8" aria-label="Every movement">
      <h2 className="mb-2 text-lg">Every movement</h2>
      <DataTable
        caption="Every movement, newest first"
        rows={page.movements}
        rowKey={(movement) => `${movement.entryId}.${movement.seq}`}
        empty={<p className="text-soft">Nothing has moved here yet.</p>}
        columns={[
          {
            key: "when",
            header: "When",
            head: true,
            cell: ({ occurredAt, bookedDay }) => {
              const trueDay = dayOf(instant(occurredAt), timeZone);
              return (
                <>
                  {formatDay(trueDay)}{" "}
                  <span className="font-normal text-soft">
                    {formatClock(instant(occurredAt), timeZone)}
                  </span>
                  {trueDay === bookedDay ? null : (
                    <span className="block text-sm font-normal text-soft">
                      booked {formatDay(day(bookedDay))}
                    </span>
                  )}
                </>
              );
            },
          },
          { key: "what", header: "What", cell: (movement) => <Cause movement={movement} /> },
          {
            key: "bag",
            header: "Bag",
            cell: ({ bagCode }) =>
              bagCode === null ? (
                "–"
              ) : (
                <Link
                  href={`/sorting/${bagCode}`}
                  className="link inline-flex min-h-11 items-center font-mono"
                >
                  {formatCode(bagCode)}
                </Link>
              ),
          },
          { key: "who", header: "By", cell: ({ doneBy }) => doneBy ?? "–" },
          {
            key: "grams",
            header: "kg",
            align: "figure",
            cell: ({ grams }) => (grams > 0 ? `+${formatKg(grams)}` : formatKg(grams)),
          },
          {
            key: "after",
            header: "Held after",
            align: "figure",
            cell: ({ afterGrams }) => formatKg(afterGrams),
          },
        ]}
      />
      {page.next === null ? null : (
        <p className="mt-3">
          <Link
            href={{ pathname: `/stock/lots/${number}`, query: { before: page.next } }}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            Older movements
          </Link>
        </p>
      )}
    </section>
  );
}
