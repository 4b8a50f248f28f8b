import { useId, type ComponentProps, type ReactNode } from "react";
import { FieldFrame } from "./field-frame";
import { FIELD_BOX, fieldAria } from "./field-style";

type SelectOption = { value: string; label: string; disabled?: boolean };

type SelectFieldProps = ComponentProps<"select"> & {
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  hideLabel?: boolean;
  options?: readonly SelectOption[];
  /** First option with an empty value: "Choose a scale". */
  placeholder?: string;
};

/** The system's own list, which a gloved thumb knows. Options as data, or `<option>`s as children. */
export function SelectField({
  label,
  hint,
  error,
  hideLabel,
  options,
  placeholder,
  children,
  className,
  id,
  ...select
}: SelectFieldProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <FieldFrame
      id={fieldId}
      label={label}
      hint={hint}
      error={error}
      hideLabel={hideLabel}
      className={className}
    >
      <div className="relative">
        <select
          {...select}
          {...fieldAria(fieldId, hint, error)}
          id={fieldId}
          className={`${FIELD_BOX} appearance-none truncate pr-10`}
        >
          {placeholder === undefined ? null : <option value="">{placeholder}</option>}
          {options?.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
          {children}
        </select>
        <svg
          aria-hidden
          viewBox="0 0 16 16"
          className="pointer-events-none absolute top-1/2 right-3.5 size-4 -translate-y-1/2 fill-none stroke-ink stroke-2"
        >
          <path d="M3 6l5 5 5-5" />
        </svg>
      </div>
    </FieldFrame>
  );
}
