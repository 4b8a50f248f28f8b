import { Button } from "@/components/ui/button";

type RowActionsProps = {
  name: string;
  retired: boolean;
  busy: boolean;
  onChange: () => void;
  onRetire: (retired: boolean) => void;
};

/** What can be done with one row; retiring is taken back by the same button, so it asks nothing first. */
export function RowActions({ name, retired, busy, onChange, onRetire }: RowActionsProps) {
  return (
    <span className="flex flex-wrap items-center justify-end gap-1">
      {retired ? <span className="text-soft">Retired</span> : null}
      <Button variant="link" size="small" aria-label={`Change ${name}`} onClick={onChange}>
        Change
      </Button>
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
