"use client";

import { TextField } from "@/components/ui/text-field";
import { fieldSentence } from "@/lib/core/messages";

/** The sentence for a reason that says too little; null when it will do. */
export function reasonProblem(reason: string): string | null {
  return reason.trim().length < 3 ? fieldSentence("too-short") : null;
}

type Props = {
  value: string;
  onValue: (value: string) => void;
  asked: boolean;
  error: string | undefined;
};

/** Why a record is corrected. */
export function ReasonField({ value, onValue, asked, error }: Props) {
  return (
    <TextField
      label="Why it is corrected"
      hint="For whoever reads the history, such as: read the wrong scale."
      name="reason"
      maxLength={500}
      value={value}
      onChange={(event) => onValue(event.target.value)}
      error={error ?? (asked ? (reasonProblem(value) ?? undefined) : undefined)}
    />
  );
}
