import { useId, type ComponentProps, type ReactNode } from "react";
import { FieldFrame } from "./field-frame";
import { FIELD_BOX, fieldAria } from "./field-style";

type TextFieldProps = Omit<ComponentProps<"input">, "children"> & {
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  hideLabel?: boolean;
  /** What stands behind the figure, such as "kg". */
  unit?: string;
  /** Weights and codes are set in mono. */
  mono?: boolean;
};

/** One line to type in. Everything that an `<input>` takes, so `{...register("name")}` works. */
export function TextField({
  label,
  hint,
  error,
  hideLabel,
  unit,
  mono = false,
  className,
  id,
  type = "text",
  ...input
}: TextFieldProps) {
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
        <input
          {...input}
          {...fieldAria(fieldId, hint, error)}
          id={fieldId}
          type={type}
          className={`${FIELD_BOX} read-only:bg-well ${mono ? "font-mono" : ""} ${unit ? "pr-14" : ""}`}
        />
        {unit ? (
          <span
            aria-hidden
            className="pointer-events-none absolute inset-y-0 right-3.5 flex items-center text-soft"
          >
            {unit}
          </span>
        ) : null}
      </div>
    </FieldFrame>
  );
}
