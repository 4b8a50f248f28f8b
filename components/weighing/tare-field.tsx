"use client";

import { WeightField } from "@/components/forms/weight-field";
import { SelectField } from "@/components/ui/select-field";
import { formatMilligrams } from "@/lib/core/mass";
import { TYPED, type TareValue } from "./form-values";
import type { ListedTare } from "./read-form";

type Props = {
  label: string;
  /** Field name within the form: "readings.0.container". */
  name: string;
  value: TareValue;
  listed: readonly ListedTare[];
  onChange(value: TareValue): void;
  error: string | undefined;
};

/** A tare from the list, or typed. */
export function TareField({ label, name, value, listed, onChange, error }: Props) {
  const typed = value.choice === TYPED;
  return (
    <div className="min-w-0">
      <SelectField
        label={label}
        name={`${name}.choice`}
        value={value.choice}
        onChange={(event) => onChange({ ...value, choice: event.target.value })}
        error={typed ? undefined : error}
      >
        <option value="">None</option>
        {listed.map(({ id, name: called, tareMilligrams }) => (
          <option key={id} value={id}>
            {called}, {formatMilligrams(tareMilligrams)} kg
          </option>
        ))}
        <option value={TYPED}>Type its weight</option>
      </SelectField>
      {typed ? (
        <WeightField
          label={`Weight of the ${label.toLowerCase()}`}
          hideLabel
          name={`${name}.text`}
          text={value.text}
          onText={(text) => onChange({ choice: TYPED, text })}
          error={error}
          optional
          className="mt-1.5"
        />
      ) : null}
    </div>
  );
}
