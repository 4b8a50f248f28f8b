"use client";

import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { LaterUses } from "@/lib/core/schemas";
import {
  acceptReadingEndpoint,
  discardReadingEndpoint,
  type ForReview,
} from "@/lib/weighing/contract/corrections";
import { ReasonField, reasonProblem } from "../removals/reason-field";

export type Deciding = { which: "accept" | "discard"; reading: ForReview };

export type Decided =
  | { kind: "accepted"; code: string; netGrams: number | null; later: LaterUses }
  | { kind: "discarded"; code: string };

type Props = {
  deciding: Deciding;
  onClose: () => void;
  onDecided: (decided: Decided) => void;
};

/** Asks why one of two readings counts. */
export function DecideDialog({ deciding: { which, reading }, onClose, onDecided }: Props) {
  const accept = useCommand(acceptReadingEndpoint);
  const discard = useCommand(discardReadingEndpoint);
  const command = which === "accept" ? accept : discard;
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const { id, code, netGrams, first } = reading;

  async function decide() {
    setAsked(true);
    if (reasonProblem(reason)) return;
    if (which === "accept") {
      const result = await accept.send({ id, reason });
      if (result.kind !== "done") return;
      const { receipt } = result;
      onDecided({ kind: "accepted", code, netGrams: receipt.netGrams, later: receipt.later });
      return;
    }
    const result = await discard.send({ id, reason });
    if (result.kind === "done") onDecided({ kind: "discarded", code });
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={which === "accept" ? "Let the second count" : "Set the second aside"}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Not now
          </Button>
          <Button busy={command.pending} onClick={() => void decide()}>
            {which === "accept" ? `Count ${formatKg(netGrams)} kg` : "Set it aside"}
          </Button>
        </>
      }
    >
      <p className="mb-4">
        {which === "accept"
          ? first
            ? `Bag ${formatCode(code)} counts ${formatKg(netGrams)} kg instead of ${formatKg(first.netGrams)} kg. It goes through also where the bag was sorted since.`
            : `Bag ${formatCode(code)} counts ${formatKg(netGrams)} kg.`
          : first
            ? `Bag ${formatCode(code)} stays at ${formatKg(first.netGrams)} kg.`
            : `Nothing counts for bag ${formatCode(code)}.`}
      </p>
      <div className="grid gap-3">
        <ReasonField
          value={reason}
          onValue={setReason}
          asked={asked}
          error={command.fieldErrors.reason}
        />
        <CommandNotice command={command} shownFields={["reason"]} />
      </div>
    </Dialog>
  );
}
