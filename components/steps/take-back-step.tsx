"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { Id } from "@/lib/core/ids";
import type { correctStepEndpoint } from "@/lib/stock/contract/steps";
import { LaterUses } from "../ledger/later-uses";
import type { LaterUses as Later } from "@/lib/core/schemas";
import { ReasonField } from "../stock/reason-field";
import { RefusalNotice } from "../stock/refusal-notice";

const CORRECT = { method: "POST", path: "/api/steps/{id}/correct" } as const;

/** Taking a step back that never was: nothing stands in its place. */
export function TakeBackStep({ id, timeZone }: { id: Id<"step">; timeZone: string }) {
  const router = useRouter();
  const correct = useCommand<typeof correctStepEndpoint>(CORRECT);
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const [later, setLater] = useState<Later | null>(null);

  async function send() {
    setAsked(true);
    if (reason.trim().length < 3) return;
    const result = await correct.send({ id, reason, replacement: null });
    if (result.kind === "done") setLater(result.receipt.later);
  }

  function close() {
    setOpen(false);
    if (later) router.refresh();
  }

  return (
    <>
      <Button variant="danger" onClick={() => setOpen(true)}>
        It never was
      </Button>
      <Dialog
        open={open}
        onClose={close}
        title="Take this step back"
        actions={
          later ? (
            <Button onClick={close}>Done</Button>
          ) : (
            <>
              <Button variant="quiet" onClick={close}>
                Cancel
              </Button>
              <Button variant="danger" busy={correct.pending} onClick={() => void send()}>
                Take it back
              </Button>
            </>
          )
        }
      >
        <div className="grid gap-4">
          {later ? (
            <LaterUses later={later} title="Taken back" timeZone={timeZone} />
          ) : (
            <>
              <p>
                Everything goes back to where it was. What was taken from it since is settled as
                difference and named.
              </p>
              <ReasonField
                value={reason}
                onValue={setReason}
                error={correct.fieldErrors.reason}
                asked={asked}
              />
              <RefusalNotice command={correct} />
            </>
          )}
        </div>
      </Dialog>
    </>
  );
}
