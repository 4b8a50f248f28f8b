"use client";

import { WeightField } from "@/components/forms/weight-field";
import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";
import { gramsFromMilligrams, readMass } from "@/lib/core/mass";
import type { Day } from "@/lib/core/time";
import type { ReceiptData } from "@/lib/removals/contract/receipts";

export type ReceiptDraft = { number: string; day: string; kg: string };

/** The request's data; null while something is missing. */
export function receiptOf(
  draft: ReceiptDraft,
): (Omit<ReceiptData, "day"> & { day: string }) | null {
  const read = readMass(draft.kg, "kg");
  if (!read.ok || draft.number.trim() === "" || draft.day === "") return null;
  const receivedGrams = gramsFromMilligrams(read.milligrams);
  return receivedGrams < 1 ? null : { number: draft.number, day: draft.day, receivedGrams };
}

type Props = {
  draft: ReceiptDraft;
  today: Day;
  /** Show what is missing, as after a tap on Save. */
  asked: boolean;
  errors: Readonly<Record<string, string>>;
  onDraft: (draft: ReceiptDraft) => void;
};

/** Number, day and weight as they stand on the receiver's receipt. */
export function ReceiptFields({ draft, today, asked, errors, onDraft }: Props) {
  const missing = (empty: boolean, code: string) =>
    asked && empty ? fieldSentence(code) : undefined;
  return (
    <>
      <TextField
        label="Number of the receipt"
        autoComplete="off"
        maxLength={60}
        value={draft.number}
        onChange={(event) => onDraft({ ...draft, number: event.target.value })}
        error={errors.number ?? missing(draft.number.trim() === "", "empty")}
      />
      <TextField
        type="date"
        label="Day of the receipt"
        max={today}
        value={draft.day}
        onChange={(event) => onDraft({ ...draft, day: event.target.value })}
        error={errors.day ?? missing(draft.day === "", "not-a-day")}
      />
      <WeightField
        label="Weight received"
        text={draft.kg}
        onText={(kg) => onDraft({ ...draft, kg })}
        showProblem={asked}
        error={errors.receivedGrams}
      />
    </>
  );
}
