"use client";

import { TextField } from "@/components/ui/text-field";
import type { WhenText } from "./when-text";

type Props = { value: WhenText; onValue: (value: WhenText) => void; error: string | undefined };

/** Day and time at the shed. */
export function WhenFields({ value, onValue, error }: Props) {
  return (
    <div className="grid grid-cols-2 gap-3">
      <TextField
        label="Day"
        name="when"
        type="date"
        value={value.day}
        onChange={(event) => onValue({ ...value, day: event.target.value })}
        error={error}
      />
      <TextField
        label="Time"
        type="time"
        value={value.clock}
        onChange={(event) => onValue({ ...value, clock: event.target.value })}
      />
    </div>
  );
}
