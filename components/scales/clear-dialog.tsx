"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import { formatDay, type Day } from "@/lib/core/time";
import { clearScaleEndpoint } from "@/lib/scales/contract/checks";

type Props = { scaleId: string; scaleName: string; day: Day; label: string };

/** A lead's word on a scale for one day, with the reason for it. */
export function ClearDialog({ scaleId, scaleName, day, label }: Props) {
  const router = useRouter();
  const clear = useCommand(clearScaleEndpoint);
  const [open, setOpen] = useState(false);
  const [note, setNote] = useState("");
  const [asked, setAsked] = useState(false);
  async function send() {
    setAsked(true);
    if (note.trim() === "") return;
    const result = await clear.send({ scaleId, day, note });
    if (result.kind !== "done") return;
    setOpen(false);
    router.refresh();
  }
  return (
    <>
      <Button variant="quiet" size="small" onClick={() => setOpen(true)}>
        {label}
      </Button>
      {open ? (
        <FormDialog
          title={`Clear ${scaleName} for ${formatDay(day)}`}
          submit="Clear it"
          onSubmit={send}
          onClose={() => setOpen(false)}
          command={clear}
          shownFields={["note", "day"]}
        >
          <p>
            Readings of this day count as looked at. What was booked before keeps saying that the
            scale was not checked.
          </p>
          <TextField
            label="Why its readings can be believed"
            hint="Such as: levelled it, the same crate weighs the same on both scales."
            value={note}
            maxLength={300}
            onChange={(event) => setNote(event.target.value)}
            error={
              clear.fieldErrors.note ??
              clear.fieldErrors.day ??
              (asked && note.trim() === "" ? fieldSentence("empty") : undefined)
            }
          />
        </FormDialog>
      ) : null}
    </>
  );
}
