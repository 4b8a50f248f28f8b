"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { Id } from "@/lib/core/ids";
import { callOffRunEndpoint } from "@/lib/production/contract/plans";

/** Calls a plan off, after a question. */
export function CallOffRun({ runId, number }: { runId: Id<"run">; number: number }) {
  const [open, setOpen] = useState(false);
  const command = useCommand(callOffRunEndpoint);
  const router = useRouter();
  const send = async () => {
    const result = await command.send({ runId });
    if (result.kind !== "done") return;
    setOpen(false);
    router.refresh();
  };
  return (
    <>
      <Button variant="quiet" size="small" className="mt-4" onClick={() => setOpen(true)}>
        Call it off
      </Button>
      <Dialog
        open={open}
        onClose={() => setOpen(false)}
        title={`Call run ${number} off?`}
        role="alertdialog"
        actions={
          <>
            <Button variant="quiet" onClick={() => setOpen(false)}>
              Keep the plan
            </Button>
            <Button variant="danger" busy={command.pending} onClick={() => void send()}>
              Call it off
            </Button>
          </>
        }
      >
        <CommandNotice command={command} />
        <p>What is reserved for it is free again at once. The plan stays in the list.</p>
      </Dialog>
    </>
  );
}
