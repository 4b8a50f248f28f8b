"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Dialog } from "@/components/ui/dialog";
import { formatKg } from "@/lib/core/mass";
import { LOSS_CAUSE_NAMES, type LossCause } from "@/lib/ledger/terms";

type Props = {
  differenceGrams: number;
  toleranceMilligrams: number;
  busy: boolean;
  /** With the cause of what is missing, or null for a surplus that is confirmed. */
  onSave: (cause: LossCause | null) => void;
  onClose: () => void;
};

/** What can happen to plastic on a sorting table; cuttings and fume belong to the workshop. */
const CAUSES: readonly LossCause[] = ["liquid", "dirt", "metal", "moisture", "spilled"];

/** Asks once where book and scale disagree by more than the scale can explain. */
export function LeftoverDialog({
  differenceGrams,
  toleranceMilligrams,
  busy,
  onSave,
  onClose,
}: Props) {
  const [cause, setCause] = useState<LossCause | "">("");
  const missing = differenceGrams > 0;
  const kg = formatKg(Math.abs(differenceGrams));
  return (
    <Dialog
      open
      onClose={onClose}
      role="alertdialog"
      title={missing ? `${kg} kg is missing` : `${kg} kg too much`}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Weigh again
          </Button>
          <Button
            busy={busy}
            disabled={missing && cause === ""}
            onClick={() => onSave(cause === "" ? null : cause)}
          >
            {missing ? `Save, ${kg} kg lost` : "It stays so, save"}
          </Button>
        </>
      }
    >
      <p className="mb-4">
        The scale can explain {formatKg(Math.floor(toleranceMilligrams / 1000))} kg.{" "}
        {missing
          ? "Weigh the piles again, or say where it went."
          : "Weigh the piles again. If it stays so, save it; the difference is written down under its own name."}
      </p>
      {missing ? (
        <ChoiceTiles
          legend="Where did it go?"
          name="cause"
          columns={2}
          value={cause}
          onChoose={(value) => setCause(value as LossCause)}
          choices={CAUSES.map((value) => ({ value, label: LOSS_CAUSE_NAMES[value] }))}
        />
      ) : null}
    </Dialog>
  );
}
