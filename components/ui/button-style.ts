export type ButtonVariant = "act" | "quiet" | "danger" | "link";
export type ButtonSize = "large" | "small";

const SHAPE =
  "inline-flex items-center justify-center gap-2.5 rounded-control text-center font-bold no-underline select-none touch-manipulation disabled:cursor-not-allowed aria-disabled:cursor-not-allowed print:hidden";

const SIZES: Record<ButtonSize, string> = {
  large: "min-h-14 px-5 py-2 text-lg/6 wide:min-h-12 wide:text-base/5",
  small: "min-h-11 px-4 py-1.5 text-base/5",
};

const VARIANTS: Record<ButtonVariant, string> = {
  act: "border-2 border-act bg-act text-on-act enabled:hover:border-ink disabled:border-rule disabled:bg-well disabled:text-soft",
  quiet:
    "border-2 border-ink bg-card text-ink enabled:hover:bg-well disabled:border-rule disabled:text-soft",
  danger:
    "border-2 border-bad bg-card text-bad enabled:hover:bg-bad-soft disabled:border-rule disabled:text-soft",
  link: "px-2! text-act underline decoration-1 underline-offset-3 hover:decoration-2 disabled:text-soft",
};

/** Classes of a button, for what must look like one but is another element (a link, a download, a summary). */
export function buttonStyle(
  variant: ButtonVariant = "act",
  size: ButtonSize = "large",
  extra = "",
): string {
  return `${SHAPE} ${SIZES[size]} ${VARIANTS[variant]} ${extra}`.trimEnd();
}
