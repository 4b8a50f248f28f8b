"use client";

import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatKg } from "@/lib/core/mass";
import { netGramsOf } from "@/lib/scales/rules/reading";
import type { RejectReason } from "@/lib/sorting/contract/sortings";
import type { DeskLists } from "../weighing/use-desk-lists";
import { readingsOf } from "./draft";
import { FractionList } from "./fraction-list";
import type { Table } from "./table-text";

type Props = {
  who: string;
  mine: Table;
  theirs: Table;
  lists: DeskLists;
  reasons: readonly RejectReason[];
  onChoose: (which: "mine" | "theirs" | "both") => void;
};

function Side({
  title,
  table,
  lists,
  reasons,
}: { title: string; table: Table } & Pick<Props, "lists" | "reasons">) {
  const { draft, codes } = table;
  const grams = readingsOf(draft, lists.containers).reduce(
    (sum, reading) => sum + netGramsOf([reading]),
    0,
  );
  return (
    <div className="min-w-0">
      <h3 className="mb-1.5 text-lg">{title}</h3>
      <p className="mb-1.5 text-sm text-soft">
        {codes.length === 1 ? "1 bag" : `${codes.length} bags`}, {formatKg(grams)} kg weighed
      </p>
      {draft.piles.length + draft.rejects.length > 0 ? (
        <FractionList
          draft={draft}
          lists={lists}
          reasons={reasons}
          errors={{}}
          onOpen={null}
          label={title}
        />
      ) : (
        <p className="rounded-ticket border-2 border-dashed border-rule px-4 py-5 text-soft">
          Nothing weighed yet.
        </p>
      )}
    </div>
  );
}

/** Two people weighed at one table: what each has, side by side, and what shall lie on it. */
export function OvertakenDialog({ who, mine, theirs, lists, reasons, onChoose }: Props) {
  return (
    <Dialog
      open
      // Without a choice nothing could be kept; the middle way loses nothing.
      onClose={() => onChoose("both")}
      role="alertdialog"
      title={`${who} weighed here too`}
      actions={
        <>
          <Button variant="quiet" onClick={() => onChoose("theirs")}>
            Take {who}&rsquo;s
          </Button>
          <Button variant="quiet" onClick={() => onChoose("mine")}>
            Keep mine
          </Button>
          <Button onClick={() => onChoose("both")}>Put both together</Button>
        </>
      }
    >
      <p className="mb-4">
        {who} changed this table while you were typing. Nothing is lost: what you do not choose can
        be brought back until it is saved.
      </p>
      <div className="grid gap-5 wide:grid-cols-2">
        <Side title="Yours" table={mine} lists={lists} reasons={reasons} />
        <Side title={`${who}’s`} table={theirs} lists={lists} reasons={reasons} />
      </div>
    </Dialog>
  );
}
