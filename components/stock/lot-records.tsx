"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState, type ReactNode } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { Button } from "@/components/ui/button";
import { DataTable } from "@/components/ui/data-table";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import type { CountView } from "@/lib/stock/contract/counts";
import type { MoveView } from "@/lib/stock/contract/moves";
import { COUNT_KIND_NAMES, IDENTIFY_METHOD_NAMES, MOVE_KIND_NAMES } from "@/lib/stock/terms";
import { CorrectCountDialog } from "./correct-count-dialog";
import { CorrectMoveDialog } from "./correct-move-dialog";
import { LaterUses } from "../ledger/later-uses";
import type { LaterUses as Later } from "@/lib/core/schemas";
import { UndoRecord } from "./undo-record";

type Props = {
  counts: readonly CountView[];
  moves: readonly MoveView[];
  number: number;
  timeZone: string;
  mayCorrect: boolean;
};

const STATE_WORDS = { posted: null, undone: "undone", corrected: "corrected" } as const;

function When({ at, by, timeZone }: { at: number; by: string; timeZone: string }) {
  return (
    <>
      {formatDay(dayOf(instant(at), timeZone))}{" "}
      <span className="font-normal text-soft">{formatClock(instant(at), timeZone)}</span>
      <span className="block text-sm font-normal text-soft">{by}</span>
    </>
  );
}

/** The last counts and moves of a lot, with undo for whoever saved them and "Correct" for a lead. */
export function LotRecords({ counts, moves, number, timeZone, mayCorrect }: Props) {
  const router = useRouter();
  const [correcting, setCorrecting] = useState<{ count: CountView } | { move: MoveView } | null>(
    null,
  );
  const [said, setSaid] = useState<ReactNode>(null);
  const close = () => setCorrecting(null);
  const saved = (later: Later) => {
    close();
    setSaid(<LaterUses later={later} title="Corrected" timeZone={timeZone} />);
    router.refresh();
  };
  if (counts.length === 0 && moves.length === 0) return null;
  return (
    <QueryProvider>
      <section className="mt-8 grid gap-6" aria-label="Counts and moves">
        {said}
        {counts.length > 0 ? (
          <div>
            <h2 className="mb-2 text-lg">Counts</h2>
            <DataTable
              caption="Counts, newest first"
              rows={counts}
              rowKey={(count) => count.countId}
              columns={[
                {
                  key: "when",
                  header: "When",
                  head: true,
                  cell: ({ occurredAt, byName }) => (
                    <When at={occurredAt} by={byName} timeZone={timeZone} />
                  ),
                },
                {
                  key: "what",
                  header: "What",
                  cell: ({ kind, state, reason, sheet, reviewedBy }) => (
                    <>
                      <span className={state === "posted" ? "" : "line-through"}>
                        {COUNT_KIND_NAMES[kind]}
                      </span>
                      <span className="block text-sm text-soft">
                        {[
                          STATE_WORDS[state],
                          reason,
                          sheet,
                          reviewedBy === null ? null : `looked at by ${reviewedBy}`,
                        ]
                          .filter(Boolean)
                          .join(", ")}
                      </span>
                    </>
                  ),
                },
                {
                  key: "book",
                  header: "Book held",
                  align: "figure",
                  cell: ({ bookGrams }) => formatKg(bookGrams),
                },
                {
                  key: "counted",
                  header: "Counted",
                  align: "figure",
                  cell: ({ countedGrams }) => formatKg(countedGrams),
                },
                {
                  key: "act",
                  header: "If wrong",
                  cell: (count) =>
                    count.state !== "posted" ? null : count.undoUntil !== null ? (
                      <UndoRecord
                        path="/api/counts/{id}/undo"
                        id={count.countId}
                        until={count.undoUntil}
                        what={`the count of ${formatKg(count.countedGrams)} kg`}
                      />
                    ) : mayCorrect ? (
                      <Button variant="link" size="small" onClick={() => setCorrecting({ count })}>
                        Correct
                      </Button>
                    ) : null,
                },
              ]}
            />
          </div>
        ) : null}
        {moves.length > 0 ? (
          <div>
            <h2 className="mb-2 text-lg">From lot to lot</h2>
            <DataTable
              caption="Merged, split and identified, newest first"
              rows={moves}
              rowKey={(move) => move.moveId}
              columns={[
                {
                  key: "when",
                  header: "When",
                  head: true,
                  cell: ({ occurredAt, byName }) => (
                    <When at={occurredAt} by={byName} timeZone={timeZone} />
                  ),
                },
                {
                  key: "what",
                  header: "What",
                  cell: ({ kind, method, state, reason }) => (
                    <>
                      <span className={state === "posted" ? "" : "line-through"}>
                        {MOVE_KIND_NAMES[kind]}
                      </span>
                      <span className="block text-sm text-soft">
                        {[
                          method === null ? null : IDENTIFY_METHOD_NAMES[method].toLowerCase(),
                          STATE_WORDS[state],
                          reason,
                        ]
                          .filter(Boolean)
                          .join(", ")}
                      </span>
                    </>
                  ),
                },
                {
                  key: "other",
                  header: "Lot",
                  cell: ({ fromNumber, toNumber }) => {
                    const other = fromNumber === number ? toNumber : fromNumber;
                    return (
                      <Link
                        href={`/stock/lots/${other}`}
                        className="link inline-flex min-h-11 items-center font-bold"
                      >
                        {fromNumber === number ? "to" : "from"} lot {other}
                      </Link>
                    );
                  },
                },
                { key: "kg", header: "kg", align: "figure", cell: ({ grams }) => formatKg(grams) },
                {
                  key: "act",
                  header: "If wrong",
                  cell: (move) =>
                    move.state !== "posted" ? null : move.undoUntil !== null ? (
                      <UndoRecord
                        path="/api/lot-moves/{id}/undo"
                        id={move.moveId}
                        until={move.undoUntil}
                        what={`the ${formatKg(move.grams)} kg that went over`}
                      />
                    ) : mayCorrect ? (
                      <Button variant="link" size="small" onClick={() => setCorrecting({ move })}>
                        Correct
                      </Button>
                    ) : null,
                },
              ]}
            />
          </div>
        ) : null}
        {correcting && "count" in correcting ? (
          <CorrectCountDialog
            count={correcting.count}
            onSaved={({ later }) => saved(later)}
            onClose={close}
          />
        ) : null}
        {correcting && "move" in correcting ? (
          <CorrectMoveDialog
            move={correcting.move}
            onSaved={({ later }) => saved(later)}
            onClose={close}
          />
        ) : null}
      </section>
    </QueryProvider>
  );
}
