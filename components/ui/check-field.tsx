import { useId, type ComponentProps, type ReactNode } from "react";
import { fieldAria } from "./field-style";

type CheckFieldProps = Omit<ComponentProps<"input">, "type" | "children"> & {
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
};

/** One thing to tick; the whole row is the target. */
export function CheckField({ label, hint, error, className = "", id, ...input }: CheckFieldProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <div className={`flex min-w-0 flex-col ${className}`}>
      <label htmlFor={fieldId} className="flex min-h-11 cursor-pointer items-center gap-3 py-1">
        <input
          {...input}
          {...fieldAria(fieldId, hint, error)}
          id={fieldId}
          type="checkbox"
          className="peer size-6 shrink-0 cursor-pointer accent-act"
        />
        <span className="font-bold">{label}</span>
      </label>
      {hint ? (
        <p id={`${fieldId}-hint`} className="pl-9 text-sm text-soft">
          {hint}
        </p>
      ) : null}
      {error ? (
        <p id={`${fieldId}-error`} className="pl-9 text-sm font-bold text-bad">
          {error}
        </p>
      ) : null}
    </div>
  );
}
