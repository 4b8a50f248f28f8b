"use client";

import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import type { closeLotEndpoint } from "@/lib/stock/contract/lot-care";
import { CLOSE } from "./addresses";
import { RefusalNotice } from "./refusal-notice";

type Props = { number: number; onSaved: (words: string) => void; onClose: () => void };

/** Closing a lot by hand. What is in it stays, and can be counted, moved and taken out. */
export function CloseDialog({ number, onSaved, onClose }: Props) {
  const close = useCommand<typeof closeLotEndpoint>(CLOSE);
  const [reason, setReason] = useState<"full" | "by-hand">("full");

  async function send() {
    const result = await close.send({ number, reason });
    if (result.kind === "done") onSaved(`Lot ${number} is closed. The next one opens by itself.`);
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title={`Close lot ${number}`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button busy={close.pending} onClick={() => void send()}>
            Close lot {number}
          </Button>
        </>
      }
    >
      <div className="grid gap-4">
        <p>
          What comes next opens a new lot with a label of its own. What is in this one can still be
          counted, moved and taken out. A lot that is closed stays closed.
        </p>
        <ChoiceTiles
          legend="Why?"
          name="reason"
          columns={2}
          value={reason}
          onChoose={(value) => setReason(value as "full" | "by-hand")}
          choices={[
            { value: "full", label: "The container is full" },
            { value: "by-hand", label: "Nothing more shall go in" },
          ]}
        />
        <RefusalNotice command={close} />
      </div>
    </Dialog>
  );
}
