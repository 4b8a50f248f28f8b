"use client";

import { useId, useState, type Ref } from "react";
import { FieldFrame } from "@/components/ui/field-frame";
import { FIELD_BOX } from "@/components/ui/field-style";
import { formatMilligrams, readMass, type MassReading, type MassUnit } from "@/lib/core/mass";
import { massSentence } from "@/lib/core/capture-messages";

type Props = {
  label: string;
  /** What is typed; the caller keeps it, so that nothing typed is ever lost. */
  text: string;
  /** Every change, with what the text reads as: milligrams, or why it is no weight. */
  onText(text: string, reading: MassReading): void;
  /** Unit of a text that names none. */
  unit?: MassUnit;
  /** `huge` is the weigh-in's reading: the largest thing on its screen. */
  size?: "plain" | "huge";
  /** A refusal's sentence for this field; stands before the field's own. */
  error?: string | null | undefined;
  /** Show the sentence for what is missing or wrong at once, as after a tap on Save. */
  showProblem?: boolean;
  /** An empty field is fine (it reads as zero for the caller). */
  optional?: boolean;
  hideLabel?: boolean;
  name?: string;
  inputRef?: Ref<HTMLInputElement>;
  className?: string;
};

/**
 * A weight by its digits: decimal comma or point, kilograms or grams, never a floating point number.
 * Below the field stands what was read, "2.340 kg", so that a slip of the comma is seen before saving.
 */
export function WeightField({
  label,
  text,
  onText,
  unit = "kg",
  size = "plain",
  error,
  showProblem = false,
  optional = false,
  hideLabel = false,
  name,
  inputRef,
  className = "",
}: Props) {
  const id = useId();
  const [left, setLeft] = useState(false);
  const reading = readMass(text, unit);
  const wrong =
    error ||
    ownSentence(reading, text, {
      optional,
      looked: showProblem || left,
      asked: showProblem,
    });
  const huge = size === "huge";
  const input = (
    <input
      id={id}
      ref={inputRef}
      name={name}
      type="text"
      inputMode="decimal"
      autoComplete="off"
      autoCorrect="off"
      spellCheck={false}
      enterKeyHint="done"
      placeholder={huge ? "0.000" : undefined}
      value={text}
      size={huge ? Math.max(5, text.length) : undefined}
      onChange={(event) => {
        setLeft(false);
        onText(event.target.value, readMass(event.target.value, unit));
      }}
      onBlur={() => setLeft(true)}
      onFocus={(event) => event.target.select()}
      aria-invalid={wrong ? true : undefined}
      aria-describedby={`${id}-said`}
      className={huge ? `${HUGE} ${hugeSize(text)}` : `${FIELD_BOX} pr-12 font-mono`}
    />
  );
  return (
    <FieldFrame id={id} label={label} hideLabel={hideLabel} className={className}>
      {huge ? (
        <span className="flex min-w-0 items-baseline gap-1.5">
          {input}
          <span aria-hidden className="font-heading text-xl font-bold">
            {unit}
          </span>
        </span>
      ) : (
        <span className="relative">
          {input}
          <span
            aria-hidden
            className="pointer-events-none absolute inset-y-0 right-3.5 flex items-center text-soft"
          >
            {unit}
          </span>
        </span>
      )}
      <span id={`${id}-said`} aria-live="polite" className="block min-h-5 text-sm">
        {wrong ? (
          <span className="font-bold text-bad">{wrong}</span>
        ) : reading.ok ? (
          <span className="text-soft">
            reads as <span className="font-mono">{formatMilligrams(reading.milligrams)}</span> kg
          </span>
        ) : null}
      </span>
    </FieldFrame>
  );
}

const HUGE =
  "field-sizing-content min-w-[2ch] max-w-full rounded-control bg-transparent font-mono font-bold leading-none tracking-tighter text-ink placeholder:font-normal placeholder:text-soft aria-invalid:text-bad";

/** A longer figure is set smaller, so that all of it stays in sight on the narrowest phone. */
function hugeSize(text: string): string {
  if (text.length <= 5) return "text-[2.75rem] min-[390px]:text-[3.25rem] wide:text-[4.5rem]";
  if (text.length <= 7) return "text-[2.125rem] min-[390px]:text-[2.5rem] wide:text-[4.5rem]";
  return "text-[1.75rem] wide:text-[3rem]";
}

/** A doubtful comma is told at once; what may only be half typed waits until the field is left. */
function ownSentence(
  reading: MassReading,
  text: string,
  when: { optional: boolean; looked: boolean; asked: boolean },
): string | null {
  if (reading.ok) return null;
  // An empty field is told when it is needed, on saving: the next bag's form begins with one.
  if (reading.problem === "empty") {
    return when.asked && !when.optional ? massSentence("empty", "") : null;
  }
  if (reading.problem === "could-be-thousands" || when.looked) {
    return massSentence(reading.problem, text.trim());
  }
  return null;
}
