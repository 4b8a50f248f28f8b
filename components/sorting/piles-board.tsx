"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import type { RejectReason } from "@/lib/sorting/contract/sortings";
import { ScaleToday } from "../scales/scale-today";
import type { DeskLists } from "../weighing/use-desk-lists";
import type { Board } from "./board";
import { newPile, newReject, type Draft } from "./draft";
import { FractionDialogs, type Opened } from "./fraction-dialogs";
import { FractionList } from "./fraction-list";
import { SumHead } from "./sum-head";

type Props = {
  draft: Draft;
  board: Board;
  bagCount: number;
  lists: DeskLists;
  reasons: readonly RejectReason[];
  /** Refusals by field of the table: "piles.0.lot". */
  errors: Readonly<Record<string, string>>;
  /** null: the session is over, and it is only looked at. */
  onDraft: ((draft: Draft) => void) | null;
};

/** Piles and rejects, their sum against what was tipped, and the scale on which they are weighed. */
export function PilesBoard({ draft, board, bagCount, lists, reasons, errors, onDraft }: Props) {
  const [opened, setOpened] = useState<Opened | null>(null);
  const { scale, count, judged, onScale } = board;
  const lastReading = (draft.rejects.at(-1) ?? draft.piles.at(-1))?.reading;
  return (
    <>
      <SumHead draft={draft} lists={lists} judged={judged} bagCount={bagCount} />
      {count > 0 ? (
        <FractionList
          draft={draft}
          lists={lists}
          reasons={reasons}
          errors={errors}
          onOpen={onDraft ? setOpened : null}
        />
      ) : null}
      {onDraft ? (
        <>
          <div className="grid grid-cols-2 gap-2.5">
            <Button
              variant={count === 0 ? "act" : "quiet"}
              onClick={() =>
                setOpened({ kind: "pile", value: newPile(draft.piles.at(-1)), isNew: true })
              }
            >
              Add pile
            </Button>
            <Button
              variant="danger"
              onClick={() =>
                setOpened({ kind: "reject", value: newReject(lastReading), isNew: true })
              }
            >
              Add reject
            </Button>
          </div>
          <div>
            <SelectField
              label="Scale"
              value={scale?.id ?? ""}
              onChange={(event) => onDraft(onScale(event.target.value))}
              options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
            />
            {scale ? (
              <ScaleToday scaleId={scale.id} onScale={(id) => onDraft(onScale(id))} />
            ) : null}
          </div>
          {opened ? (
            <FractionDialogs
              key={opened.value.id}
              opened={opened}
              draft={draft}
              lists={lists}
              scale={scale}
              reasons={reasons}
              onDraft={(next) => {
                onDraft(next);
                setOpened(null);
              }}
              onClose={() => setOpened(null)}
            />
          ) : null}
        </>
      ) : null}
    </>
  );
}
