"use client";

import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import type { countLotEndpoint, CountReceipt } from "@/lib/stock/contract/counts";
import { COUNT } from "./addresses";
import { BinWeighing } from "./bin-weighing";
import { errorsUnder } from "./field-errors";
import { sentFound, type FoundValue } from "./left-fields";
import type { LotFacts } from "./lot-facts";
import { RefusalNotice } from "./refusal-notice";
import { useBinDesk } from "./use-bin-desk";
import { firstWeighing, netOfWeighing } from "./weighing-value";

type Props = {
  lot: LotFacts;
  /** "empty" opens with that answer given. */
  found: "weighed" | "empty";
  onSaved: (receipt: CountReceipt) => void;
  onClose: () => void;
};

const rightNow = (): number => Date.now();

const MEANWHILE = ["lot-counted-meanwhile", "lot-moved-meanwhile"] as const;

/** "3.120 kg in the bin", or "bin is empty". */
export function CountDialog({ lot, found, onSaved, onClose }: Props) {
  const { lists, scaleId } = useBinDesk();
  const count = useCommand<typeof countLotEndpoint>(COUNT);
  const [typed, setTyped] = useState<FoundValue>({
    found,
    weighing: firstWeighing("", lot.containerId),
  });
  const [asked, setAsked] = useState(false);
  const value: FoundValue = {
    ...typed,
    weighing: { ...typed.weighing, scaleId: typed.weighing.scaleId || scaleId },
  };
  const net = netOfWeighing(value.weighing, lists.containers);
  const meanwhile = MEANWHILE.some((code) => code === count.problem?.code);

  async function send(confirmed: boolean) {
    setAsked(true);
    const counted = sentFound(value, lists);
    if (!counted) return;
    const result = await count.send(
      { number: lot.number, occurredAt: rightNow(), counted, seen: lot.seen, confirmed },
      { pressedAt: "occurredAt" },
    );
    if (result.kind === "done") onSaved(result.receipt);
  }

  const words =
    value.found === "empty"
      ? "Bin is empty, save"
      : net === null
        ? "Save count"
        : `Save ${formatKg(net)} kg`;
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Count lot ${lot.number}`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          {meanwhile ? (
            <Button busy={count.pending} onClick={() => void send(true)}>
              Let mine stand
            </Button>
          ) : (
            <Button busy={count.pending} onClick={() => void send(false)}>
              {words}
            </Button>
          )}
        </>
      }
    >
      <div className="grid gap-4">
        <p className="text-soft">
          The book holds <span className="font-mono">{formatKg(lot.heldGrams)}</span> kg. What you
          weigh counts.
        </p>
        <ChoiceTiles
          legend="What is in the bin?"
          hideLegend
          name="found"
          columns={2}
          value={value.found}
          onChoose={(next) => setTyped({ ...typed, found: next as FoundValue["found"] })}
          choices={[
            { value: "weighed", label: "Weigh it" },
            { value: "empty", label: "Bin is empty" },
          ]}
        />
        {value.found === "weighed" ? (
          <BinWeighing
            value={value.weighing}
            onValue={(weighing) => setTyped({ ...typed, weighing })}
            lists={lists}
            asked={asked}
            errors={errorsUnder(count.fieldErrors, "counted")}
            label="In the bin"
          />
        ) : (
          <p>
            The lot closes, and the next one opens by itself.
            {lot.heldGrams > 0 ? ` ${formatKg(lot.heldGrams)} kg stand as difference.` : ""}
          </p>
        )}
        {meanwhile ? (
          <Notice tone="warn" title="Somebody was here meanwhile" live="alert">
            {count.problem?.detail}
          </Notice>
        ) : (
          <RefusalNotice command={count} />
        )}
      </div>
    </Dialog>
  );
}
