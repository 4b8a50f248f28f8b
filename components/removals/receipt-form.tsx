"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import type { Day } from "@/lib/core/time";
import { enterReceiptEndpoint } from "@/lib/removals/contract/receipts";
import { ReceiptFields, receiptOf, type ReceiptDraft } from "./receipt-fields";

type Props = { removalId: string; today: Day };

/** Enters the receiver's receipt. */
export function ReceiptForm({ removalId, today }: Props) {
  const router = useRouter();
  const save = useCommand(enterReceiptEndpoint);
  const [draft, setDraft] = useState<ReceiptDraft>({ number: "", day: today, kg: "" });
  const [asked, setAsked] = useState(false);
  async function send() {
    setAsked(true);
    const receipt = receiptOf(draft);
    if (!receipt) return;
    const result = await save.send({ id: removalId, ...receipt });
    if (result.kind === "done") router.refresh();
  }
  return (
    <form
      noValidate
      className="grid gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <CommandNotice command={save} shownFields={["number", "day", "receivedGrams"]} />
      <ReceiptFields
        draft={draft}
        today={today}
        asked={asked}
        errors={save.fieldErrors}
        onDraft={setDraft}
      />
      <Button type="submit" busy={save.pending}>
        Save the receipt
      </Button>
    </form>
  );
}
