import type { ReactNode } from "react";

type FieldFrameProps = {
  id: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: ReactNode;
  /** For a select or input that needs no visible label because its place says it; still read aloud. */
  hideLabel?: boolean;
  className?: string;
  children: ReactNode;
};

/** Label above, hint below it, the field, and what is wrong with it. Ids: `${id}-hint`, `${id}-error`. */
export function FieldFrame({
  id,
  label,
  hint,
  error,
  hideLabel = false,
  className = "",
  children,
}: FieldFrameProps) {
  return (
    <div className={`flex min-w-0 flex-col gap-1.5 ${className}`}>
      <label htmlFor={id} className={hideLabel ? "sr-only" : "text-sm font-bold text-ink"}>
        {label}
      </label>
      {hint ? (
        <p id={`${id}-hint`} className="-mt-1 text-sm text-soft">
          {hint}
        </p>
      ) : null}
      {children}
      {error ? (
        <p id={`${id}-error`} className="text-sm font-bold text-bad">
          {error}
        </p>
      ) : null}
    </div>
  );
}
