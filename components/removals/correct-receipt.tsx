"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { FormDialog } from "@/components/forms/form-dialog";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import type { Day } from "@/lib/core/time";
import { correctReceiptEndpoint } from "@/lib/removals/contract/receipts";
import type { ReceiptView } from "@/lib/removals/queries/removal-page";
import { ReasonField, reasonProblem } from "./reason-field";
import { ReceiptFields, receiptOf, type ReceiptDraft } from "./receipt-fields";
import { formErrors, kgText } from "./removal-draft";

type Props = {
  removalId: string;
  receipt: Pick<ReceiptView, "id" | "number" | "receivedGrams">;
  /** Day of the receipt. */
  day: Day;
  today: Day;
};

/** Corrects a receipt, or says that there is none. */
export function CorrectReceipt({ removalId, receipt, day, today }: Props) {
  const router = useRouter();
  const save = useCommand(correctReceiptEndpoint);
  const [open, setOpen] = useState(false);
  const [none, setNone] = useState(false);
  const [asked, setAsked] = useState(false);
  const [reason, setReason] = useState("");
  const [draft, setDraft] = useState<ReceiptDraft>({
    number: receipt.number,
    day,
    kg: kgText(receipt.receivedGrams),
  });
  const errors = formErrors(save.fieldErrors);
  async function send() {
    setAsked(true);
    const replacement = none ? null : receiptOf(draft);
    if (reasonProblem(reason) || (!none && !replacement)) return;
    const result = await save.send({ id: removalId, receiptId: receipt.id, reason, replacement });
    if (result.kind !== "done") return;
    setOpen(false);
    router.refresh();
  }
  return (
    <>
      <Button variant="quiet" size="small" onClick={() => setOpen(true)}>
        Correct the receipt
      </Button>
      {open ? (
        <FormDialog
          title={`Correct receipt ${receipt.number}`}
          submit={none ? "Take it back" : "Save the correction"}
          onSubmit={send}
          onClose={() => setOpen(false)}
          command={save}
          shownFields={["reason", "replacement.number", "replacement.day"]}
        >
          <CheckField
            label="There is no receipt"
            checked={none}
            onChange={(event) => setNone(event.target.checked)}
          />
          {none ? null : (
            <ReceiptFields
              draft={draft}
              today={today}
              asked={asked}
              errors={errors}
              onDraft={setDraft}
            />
          )}
          <ReasonField value={reason} onValue={setReason} asked={asked} error={errors.reason} />
        </FormDialog>
      ) : null}
    </>
  );
}
