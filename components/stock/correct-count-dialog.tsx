"use client";

import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import type { OutputOf } from "@/components/forms/fetch-endpoint";
import { formatKg } from "@/lib/core/mass";
import type { correctCountEndpoint, CountView } from "@/lib/stock/contract/counts";
import { CORRECT_COUNT } from "./addresses";
import { BinWeighing } from "./bin-weighing";
import { errorsUnder } from "./field-errors";
import { ReasonField } from "./reason-field";
import { RefusalNotice } from "./refusal-notice";
import { useBinDesk } from "./use-bin-desk";
import { firstWeighing, sentWeighing } from "./weighing-value";

type Props = {
  count: CountView;
  onSaved: (receipt: OutputOf<typeof correctCountEndpoint>) => void;
  onClose: () => void;
};

type Instead = "weighed" | "empty" | "nothing";

/** Puts a count right: what was there instead, or that it never was. */
export function CorrectCountDialog({ count, onSaved, onClose }: Props) {
  const { lists, scaleId } = useBinDesk();
  const correct = useCommand<typeof correctCountEndpoint>(CORRECT_COUNT);
  const [instead, setInstead] = useState<Instead>("weighed");
  const [typed, setTyped] = useState(firstWeighing(""));
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const weighing = { ...typed, scaleId: typed.scaleId || scaleId };

  async function send() {
    setAsked(true);
    const weighed = instead === "weighed" ? sentWeighing(weighing, lists.containers) : null;
    if (reason.trim().length < 3 || (instead === "weighed" && !weighed)) return;
    const result = await correct.send({
      id: count.countId,
      reason,
      replacement: weighed
        ? { found: "weighed", ...weighed }
        : instead === "empty"
          ? { found: "empty" }
          : null,
    });
    if (result.kind === "done") onSaved(result.receipt);
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Correct the count of lot ${count.number}`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button busy={correct.pending} onClick={() => void send()}>
            {instead === "nothing" ? "Take it back" : "Correct it"}
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <p>
          {count.byName} counted{" "}
          <strong className="font-mono">{formatKg(count.countedGrams)}</strong> kg; the book held{" "}
          <span className="font-mono">{formatKg(count.bookGrams)}</span> kg then.
        </p>
        <ChoiceTiles
          legend="What was really there?"
          name="instead"
          columns={3}
          value={instead}
          onChoose={(value) => setInstead(value as Instead)}
          choices={[
            { value: "weighed", label: "Another weight" },
            { value: "empty", label: "Nothing" },
            { value: "nothing", label: "It was not counted" },
          ]}
        />
        {instead === "weighed" ? (
          <BinWeighing
            value={weighing}
            onValue={setTyped}
            lists={lists}
            asked={asked}
            errors={errorsUnder(correct.fieldErrors, "replacement")}
            label="It was"
          />
        ) : null}
        <ReasonField
          value={reason}
          onValue={setReason}
          error={correct.fieldErrors.reason}
          asked={asked}
        />
        <RefusalNotice command={correct} />
      </div>
    </Dialog>
  );
}
