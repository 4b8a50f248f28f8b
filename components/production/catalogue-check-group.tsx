import { useId } from "react";
import type { UseFormRegisterReturn } from "react-hook-form";
import { CheckField } from "@/components/ui/check-field";

type Props = {
  legend: string;
  hint?: string;
  choices: readonly { value: string; label: string }[];
  /** Of one name for all boxes: the form holds the list of what is ticked. */
  field: UseFormRegisterReturn;
  error: string | undefined;
};

/** Several of a few answers. */
export function CatalogueCheckGroup({ legend, hint, choices, field, error }: Props) {
  const id = useId();
  const described = [hint ? `${id}-hint` : "", error ? `${id}-error` : ""]
    .filter(Boolean)
    .join(" ");
  return (
    <fieldset className="min-w-0" aria-describedby={described || undefined}>
      <legend className="text-sm font-bold text-ink">{legend}</legend>
      {hint ? (
        <p id={`${id}-hint`} className="mt-0.5 text-sm text-soft">
          {hint}
        </p>
      ) : null}
      <div
        className={`mt-1.5 grid grid-cols-2 gap-x-4 rounded-control border bg-card px-3.5 py-1 wide:grid-cols-3 ${error ? "border-2 border-bad" : "border-rule"}`}
      >
        {choices.map(({ value, label }) => (
          <CheckField
            key={value}
            {...field}
            value={value}
            label={label}
            aria-invalid={error ? true : undefined}
          />
        ))}
      </div>
      {error ? (
        <p id={`${id}-error`} className="mt-1.5 text-sm font-bold text-bad">
          {error}
        </p>
      ) : null}
    </fieldset>
  );
}
