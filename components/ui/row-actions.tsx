import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";

type RowActionsProps = {
  name: string;
  retired: boolean;
  busy: boolean;
  /** Left out where a row is never changed. */
  onChange?: () => void;
  onRetire: (retired: boolean) => void;
  /** Another action, before the others. */
  children?: ReactNode;
};

/** What can be done with one row; retiring is taken back by the same button, so it asks nothing first. */
export function RowActions({ name, retired, busy, onChange, onRetire, children }: RowActionsProps) {
  return (
    <span className="flex flex-wrap items-center justify-end gap-1">
      {retired ? <span className="text-soft">Retired</span> : null}
      {children}
      {onChange ? (
        <Button variant="link" size="small" aria-label={`Change ${name}`} onClick={onChange}>
          Change
        </Button>
      ) : null}
      <Button
        variant="link"
        size="small"
        busy={busy}
        aria-label={`${retired ? "Bring back" : "Retire"} ${name}`}
        onClick={() => onRetire(!retired)}
      >
        {retired ? "Bring back" : "Retire"}
      </Button>
    </span>
  );
}
