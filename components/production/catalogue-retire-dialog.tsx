"use client";

import { CommandNotice } from "@/components/forms/command-notice";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { ProblemDocument } from "@/lib/core/errors";

type Props = {
  name: string;
  /** What it means for plans and runs. */
  meaning: string;
  command: { pending: boolean; problem: ProblemDocument | null; unreachable: boolean };
  onRetire: () => void;
  onClose: () => void;
};

/** Asks before an entry leaves the catalogue. */
export function CatalogueRetireDialog({ name, meaning, command, onRetire, onClose }: Props) {
  return (
    <Dialog
      open
      role="alertdialog"
      title={<span className="wrap-anywhere">Retire {name}</span>}
      onClose={onClose}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Keep it
          </Button>
          <Button variant="danger" busy={command.pending} onClick={onRetire}>
            Retire it
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <CommandNotice command={command} />
        <p>{meaning}</p>
        <p className="text-soft">
          Its name stays taken, and it cannot be brought back. To mend a figure, change it instead.
        </p>
      </div>
    </Dialog>
  );
}
