"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { giveUpDraft } from "./draft-server";
import { forgetTable } from "./kept-tables";

/** version null: it is kept on this device only. */
export type GivenUp = { id: string; version: number | null };

type Props = { given: GivenUp; helperId: string; onClose: () => void };

/** Asks before what was weighed is thrown away. */
export function GiveUpDialog({ given: { id, version }, helperId, onClose }: Props) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);

  async function giveUp() {
    if (version !== null) {
      setBusy(true);
      const result = await giveUpDraft(id, version);
      setBusy(false);
      if (result.kind === "unreachable") {
        setProblem(
          "The server did not answer, so it is not known whether the session was given up. Try again in a moment.",
        );
        return;
      }
      // One that is over already is what was wanted.
      if (result.kind === "refused" && result.problem.code !== "draft-over") {
        setProblem(result.problem.detail);
        return;
      }
    }
    forgetTable(helperId, id);
    onClose();
  }

  return (
    <Dialog
      open
      onClose={onClose}
      role="alertdialog"
      title="Give this session up?"
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Keep it
          </Button>
          <Button variant="danger" busy={busy} onClick={() => void giveUp()}>
            Give it up
          </Button>
        </>
      }
    >
      <p>Its bags wait again. The piles that were weighed are thrown away.</p>
      {problem ? (
        <Notice tone="bad" title="It was not given up" live="alert" className="mt-3">
          {problem}
        </Notice>
      ) : null}
    </Dialog>
  );
}
