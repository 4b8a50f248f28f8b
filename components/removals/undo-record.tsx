"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { undoReceiptEndpoint } from "@/lib/removals/contract/receipts";
import { undoRemovalEndpoint } from "@/lib/removals/contract/removals";

type Props = {
  removalId: string;
  /** A receipt of it; the removal itself without. */
  receiptId?: string;
  until: number;
};

/** Takes a removal or its receipt back, for as long as whoever saved it may. */
export function UndoRecord({ removalId, receiptId, until }: Props) {
  const router = useRouter();
  const removal = useCommand(undoRemovalEndpoint);
  const receipt = useCommand(undoReceiptEndpoint);
  const command = receiptId === undefined ? removal : receipt;
  const [over, setOver] = useState(false);
  useEffect(() => {
    const left = Math.max(0, until - Date.now());
    const timer = setTimeout(() => setOver(true), left);
    return () => clearTimeout(timer);
  }, [until]);
  async function undo() {
    const result = await (receiptId === undefined
      ? removal.send({ id: removalId })
      : receipt.send({ id: removalId, receiptId }));
    if (result.kind === "done") router.refresh();
  }
  return (
    <div>
      {over ? null : (
        <Button variant="quiet" size="small" busy={command.pending} onClick={() => void undo()}>
          {receiptId === undefined ? "Undo this removal" : "Undo this receipt"}
        </Button>
      )}
      {command.problem || command.unreachable ? (
        <p role="alert" className="mt-2 font-bold text-bad">
          {command.problem?.detail ?? UNANSWERED_SENTENCE}
        </p>
      ) : null}
    </div>
  );
}
