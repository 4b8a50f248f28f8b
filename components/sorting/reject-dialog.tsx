"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import type { RejectReason } from "@/lib/sorting/contract/sortings";
import type { ListedTare } from "../weighing/read-form";
import type { DeskScale } from "../weighing/use-desk-lists";
import { netOf, type RejectDraft } from "./draft";
import { WeighingFields } from "./weighing-fields";

type Props = {
  reject: RejectDraft;
  isNew: boolean;
  reasons: readonly RejectReason[];
  scale: DeskScale | undefined;
  tares: readonly ListedTare[];
  onSave: (reject: RejectDraft) => void;
  onRemove: () => void;
  onClose: () => void;
};

/** What is turned away: why, and what it weighs. */
export function RejectDialog({
  reject: first,
  isNew,
  reasons,
  scale,
  tares,
  onSave,
  onRemove,
  onClose,
}: Props) {
  const [reject, setReject] = useState(first);
  const [asked, setAsked] = useState(false);
  const net = netOf(reject.reading, tares);
  const warned = reasons.find((reason) => reason.code === reject.reason)?.warning ?? false;

  function save() {
    if (reject.reason !== "" && net !== null && net > 0) onSave(reject);
    else setAsked(true);
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={isNew ? "Add reject" : "Change reject"}
      actions={
        <>
          {isNew ? null : (
            <Button variant="danger" onClick={onRemove}>
              Remove reject
            </Button>
          )}
          <Button onClick={save}>
            {net !== null && net > 0 ? `Turn ${formatKg(net)} kg away` : "Turn it away"}
          </Button>
        </>
      }
    >
      <div className="grid gap-5">
        <ChoiceTiles
          legend="Why"
          name="reason"
          columns={2}
          value={reject.reason}
          onChoose={(reason) => setReject({ ...reject, reason })}
          error={asked && reject.reason === "" ? "Choose the reason." : undefined}
          choices={reasons.map((reason) => ({ value: reason.code, label: reason.name }))}
        />
        {warned ? (
          <Notice tone="bad" title="Stop, gloves, set aside" live="alert">
            Do not reach into the bag again with bare hands. Put it into the marked tub and tell a
            lead. The machine&rsquo;s manual and local rules come first.
          </Notice>
        ) : null}
        <WeighingFields
          value={reject.reading}
          onValue={(reading) => setReject({ ...reject, reading })}
          scale={scale}
          tares={tares}
          asked={asked}
        />
      </div>
    </Dialog>
  );
}
