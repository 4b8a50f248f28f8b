"use client";

import { useRouter } from "next/navigation";
import { useState, type ReactNode } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import type { CountReceipt } from "@/lib/stock/contract/counts";
import type { MoveReceipt } from "@/lib/stock/contract/moves";
import { CloseDialog } from "./close-dialog";
import { CountDialog } from "./count-dialog";
import { IdentifyDialog } from "./identify-dialog";
import type { LotFacts } from "./lot-facts";
import { MoveDialog } from "./move-dialog";
import { UndoRecord } from "./undo-record";

type Props = {
  lot: LotFacts;
  may: {
    count: boolean;
    identify: boolean;
    move: boolean;
    step: boolean;
    remove: boolean;
    close: boolean;
  };
};
type Opened = "count" | "empty" | "close" | "merge" | "split" | "identify";

function countWords({ number, countedGrams, differenceGrams, closed }: CountReceipt): string {
  const off =
    differenceGrams === 0
      ? "just as the book says"
      : `${formatKg(Math.abs(differenceGrams))} kg ${differenceGrams > 0 ? "more" : "less"} than the book`;
  const end = closed ? ` Lot ${number} is closed; the next one opens by itself.` : "";
  return `${formatKg(countedGrams)} kg counted, ${off}.${end}`;
}

function moveWords({ grams, from, to }: MoveReceipt): string {
  const opened = to.opened ? ", a new lot" : "";
  return `${formatKg(grams)} kg went from lot ${from.number} to lot ${to.number}${opened}.`;
}

/** What can be done with a lot here; after saving, what happened, with undo. */
export function LotActions({ lot, may }: Props) {
  const router = useRouter();
  const [opened, setOpened] = useState<Opened | null>(null);
  const [more, setMore] = useState(false);
  const [said, setSaid] = useState<{ words: string; undo: ReactNode } | null>(null);
  const close = () => setOpened(null);
  const done = (words: string, undo: ReactNode = null) => {
    setOpened(null);
    setSaid({ words, undo });
    router.refresh();
  };
  const counted = (receipt: CountReceipt) =>
    done(
      countWords(receipt),
      <UndoRecord
        path="/api/counts/{id}/undo"
        id={receipt.countId}
        until={receipt.undoUntil}
        what={`the count of lot ${lot.number}`}
        onUndone={() => setSaid({ words: "The count was taken back.", undo: null })}
      />,
    );
  const moved = (receipt: MoveReceipt) =>
    done(
      moveWords(receipt),
      <UndoRecord
        path="/api/lot-moves/{id}/undo"
        id={receipt.moveId}
        until={receipt.undoUntil}
        what={`what went out of lot ${lot.number}`}
        onUndone={() => setSaid({ words: "It was taken back.", undo: null })}
      />,
    );
  return (
    <QueryProvider>
      <section aria-label="What to do with this lot" className="mb-5 grid gap-3">
        {said ? <Notice tone="ok" title={said.words} live="status" action={said.undo} /> : null}
        <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
          {may.count ? (
            <>
              <Button onClick={() => setOpened("count")}>Count it</Button>
              <Button variant="quiet" onClick={() => setOpened("empty")}>
                Bin is empty
              </Button>
            </>
          ) : null}
          {may.identify && lot.polymer === "not-sure" ? (
            <Button variant="quiet" onClick={() => setOpened("identify")}>
              Identify
            </Button>
          ) : null}
          {may.step ? (
            <ButtonLink
              variant="quiet"
              href={{ pathname: "/steps/new", query: { from: String(lot.number) } }}
            >
              Wash, dry or shred
            </ButtonLink>
          ) : null}
          <Button
            variant="quiet"
            aria-expanded={more}
            onClick={() => setMore(!more)}
            className="wide:hidden"
          >
            {more ? "Less" : "More"}
          </Button>
        </div>
        <div
          className={`flex-wrap gap-2.5 max-wide:*:grow wide:flex ${more ? "flex" : "max-wide:hidden"}`}
        >
          {may.move ? (
            <>
              <Button variant="quiet" onClick={() => setOpened("merge")}>
                Pour into another
              </Button>
              <Button variant="quiet" onClick={() => setOpened("split")}>
                Split
              </Button>
            </>
          ) : null}
          {may.remove && (lot.heldGrams > 0 || lot.closedAt === null) ? (
            <ButtonLink
              variant="quiet"
              href={{ pathname: "/removals/new", query: { lot: String(lot.number) } }}
            >
              Take away
            </ButtonLink>
          ) : null}
          {may.close && lot.closedAt === null ? (
            <Button variant="quiet" onClick={() => setOpened("close")}>
              Close lot
            </Button>
          ) : null}
          <ButtonLink
            variant="quiet"
            href={{ pathname: "/stock/lots/labels", query: { lots: String(lot.number) } }}
          >
            Print label
          </ButtonLink>
        </div>
        {opened === "count" || opened === "empty" ? (
          <CountDialog
            lot={lot}
            found={opened === "empty" ? "empty" : "weighed"}
            onSaved={counted}
            onClose={close}
          />
        ) : null}
        {opened === "close" ? (
          <CloseDialog number={lot.number} onSaved={(words) => done(words)} onClose={close} />
        ) : null}
        {opened === "merge" || opened === "split" ? (
          <MoveDialog lot={lot} kind={opened} onSaved={moved} onClose={close} />
        ) : null}
        {opened === "identify" ? (
          <IdentifyDialog lot={lot} onSaved={moved} onClose={close} />
        ) : null}
      </section>
    </QueryProvider>
  );
}
