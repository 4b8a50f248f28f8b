"use client";

import { useId } from "react";
import { readDay, type Day } from "@/lib/core/time";

type Props = {
  label: string;
  /** null while the field is empty or holds no day. */
  value: Day | null;
  onDay(day: Day | null): void;
  from?: Day;
  /** Last day that can be chosen, itself included. */
  to?: Day;
  error?: string | undefined;
  name?: string;
  className?: string;
};

/** A day of the scheme's calendar, through the browser's own date field. */
export function DayField({ label, value, onDay, from, to, error, name, className = "" }: Props) {
  const id = useId();
  return (
    <div className={className}>
      <label htmlFor={id} className="mb-1 block text-[13px] font-semibold text-soft">
        {label}
      </label>
      <input
        id={id}
        name={name}
        type="date"
        min={from}
        max={to}
        value={value ?? ""}
        onChange={(event) => onDay(readDay(event.target.value))}
        aria-invalid={error ? true : undefined}
        aria-describedby={error ? `${id}-error` : undefined}
        className="h-12 w-full rounded-[10px] border border-rule bg-card px-3 text-base text-ink aria-[invalid]:border-bad"
      />
      {error && (
        <span id={`${id}-error`} className="mt-1 block text-sm text-bad">
          {error}
        </span>
      )}
    </div>
  );
}
