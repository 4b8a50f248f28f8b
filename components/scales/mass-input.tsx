"use client";

import { useState } from "react";
import { useController, type Control, type FieldPath, type FieldValues } from "react-hook-form";
import { WeightField } from "@/components/forms/weight-field";
import { formatMilligrams, formatStep, type MassUnit } from "@/lib/core/mass";

type MassInputProps<Values extends FieldValues, Output> = {
  control: Control<Values, unknown, Output>;
  /** A field that holds whole milligrams. */
  name: FieldPath<Values>;
  label: string;
  unit: MassUnit;
  error: string | undefined;
};

/** A weight field of a form: shows text, holds milligrams, and holds nothing while the text is no weight. */
export function MassInput<Values extends FieldValues, Output>({
  control,
  name,
  label,
  unit,
  error,
}: MassInputProps<Values, Output>) {
  const { field, formState } = useController({ control, name });
  const [text, setText] = useState(() => {
    const start: unknown = field.value;
    if (typeof start !== "number") return "";
    // From 1 kg on a step names its unit, so that 2 kg stays 2 kg in a field of grams.
    return unit === "kg" ? formatMilligrams(start) : formatStep(start).replace(/\u00a0g$/, "");
  });
  return (
    <WeightField
      label={label}
      unit={unit}
      text={text}
      name={name}
      inputRef={field.ref}
      showProblem={formState.isSubmitted}
      error={error}
      onText={(typed, reading) => {
        setText(typed);
        field.onChange(reading.ok ? reading.milligrams : undefined);
      }}
    />
  );
}
