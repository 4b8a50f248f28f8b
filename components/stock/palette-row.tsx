import { Button } from "@/components/ui/button";
import type { Colour } from "@/lib/stock/contract/palette";
import { PaletteSwatch } from "./palette-swatch";

type PaletteRowProps = {
  colour: Colour;
  busy: boolean;
  onChange: () => void;
  onRetire?: () => void;
  onRestore?: () => void;
  /** null at the end of the list; missing where there is no order. */
  onUp?: (() => void) | null;
  onDown?: (() => void) | null;
};

/** One colour with what can be done with it. */
export function PaletteRow({
  colour,
  busy,
  onChange,
  onRetire,
  onRestore,
  onUp,
  onDown,
}: PaletteRowProps) {
  const { name, hex, look } = colour;
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-1 rounded-control border border-rule bg-card py-2 pr-2 pl-3">
      <span className="size-11 shrink-0 overflow-hidden rounded-control border border-rule">
        <PaletteSwatch hex={hex} look={look} size={44} />
      </span>
      <span className="min-w-0 grow basis-32">
        <span className="block font-bold">{name}</span>
        <span className="block font-mono text-sm text-soft">{look === "mixed" ? "many" : hex}</span>
      </span>
      <span className="ml-auto flex flex-wrap items-center justify-end gap-1">
        {onUp === undefined || onDown === undefined ? null : (
          <>
            <MoveButton label={`Move ${name} up`} path="M5 14l7-7 7 7" busy={busy} onMove={onUp} />
            <MoveButton
              label={`Move ${name} down`}
              path="M5 10l7 7 7-7"
              busy={busy}
              onMove={onDown}
            />
          </>
        )}
        <Button variant="link" size="small" aria-label={`Change ${name}`} onClick={onChange}>
          Change
        </Button>
        {onRetire ? (
          <Button
            variant="link"
            size="small"
            busy={busy}
            aria-label={`Retire ${name}`}
            onClick={onRetire}
          >
            Retire
          </Button>
        ) : null}
        {onRestore ? (
          <Button
            variant="link"
            size="small"
            busy={busy}
            aria-label={`Bring back ${name}`}
            onClick={onRestore}
          >
            Bring back
          </Button>
        ) : null}
      </span>
    </li>
  );
}

function MoveButton({
  label,
  path,
  busy,
  onMove,
}: {
  label: string;
  path: string;
  busy: boolean;
  onMove: (() => void) | null;
}) {
  return (
    <button
      type="button"
      aria-label={label}
      // Not `disabled`: at the end of the list it keeps the focus of whoever pressed it with a key.
      aria-disabled={onMove === null || busy || undefined}
      onClick={() => {
        if (onMove && !busy) onMove();
      }}
      className="grid size-11 place-items-center rounded-control hover:bg-well aria-disabled:text-soft"
    >
      <svg aria-hidden viewBox="0 0 24 24" className="size-5 fill-none stroke-current stroke-2">
        <path d={path} />
      </svg>
    </button>
  );
}
