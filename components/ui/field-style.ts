import type { ReactNode } from "react";

/** Classes that every box to type in or choose from shares; 56 px high on phones, 48 px with a mouse. */
export const FIELD_BOX =
  "w-full min-w-0 rounded-control border border-edge bg-card px-3.5 py-2 text-base text-ink min-h-14 wide:min-h-12 " +
  "placeholder:text-soft aria-invalid:border-2 aria-invalid:border-bad disabled:cursor-not-allowed disabled:border-rule disabled:bg-well disabled:text-soft";

/** `aria-describedby` and `aria-invalid` of a field in a FieldFrame with this id. */
export function fieldAria(
  id: string,
  hint: ReactNode,
  error: ReactNode,
): { "aria-describedby": string | undefined; "aria-invalid": true | undefined } {
  const described = [hint ? `${id}-hint` : "", error ? `${id}-error` : ""]
    .filter(Boolean)
    .join(" ");
  return { "aria-describedby": described || undefined, "aria-invalid": error ? true : undefined };
}
