import { hatchPath } from "./flake-shapes";
import { SwatchPaint, type SwatchPattern } from "./swatch-paint";

type StockWellProps = {
  /** What a screen reader says: "HDPE, blue: 5.79 kg, 1.20 kg of it reserved". */
  label: string;
  /** In the plate, formatted in kg; null: nothing of this kind, a dashed outline. */
  kg: string | null;
  /** Part of the fullest cell, 0 to 1. */
  fill: number;
  /** Part of this cell's content that is reserved, 0 to 1; hatched at the top of the fill. */
  reserved?: number;
  hex?: string | null;
  pattern?: SwatchPattern;
  seed?: number;
  className?: string;
};

/** A cell of the stock: filled from below in proportion to the fullest one. */
export function StockWell({
  label,
  kg,
  fill,
  reserved = 0,
  hex,
  pattern,
  seed = 1,
  className = "h-26",
}: StockWellProps) {
  if (kg === null) {
    return (
      <span
        className={`block min-w-0 rounded-control border border-dashed border-rule ${className}`}
      >
        <span className="sr-only">{label}</span>
      </span>
    );
  }
  const share = Math.min(1, Math.max(0, fill));
  const held = Math.min(1, Math.max(0, reserved));
  return (
    <span
      className={`relative block min-w-0 overflow-hidden rounded-control bg-well print:border print:border-rule ${className}`}
    >
      <span className="sr-only">{label}</span>
      {share > 0 ? (
        <span
          aria-hidden
          // At least a line: a gram in a bin is still there.
          style={{ height: `max(3px, ${(share * 100).toFixed(2)}%)` }}
          className="absolute inset-x-0 bottom-0 block overflow-hidden border-t border-edge"
        >
          <span className="absolute inset-x-0 bottom-0 block h-30">
            <SwatchPaint hex={hex} pattern={pattern} seed={seed} width={120} height={120} />
          </span>
          {held > 0 ? (
            <span
              style={{ height: `${(held * 100).toFixed(2)}%` }}
              className="absolute inset-x-0 top-0 block overflow-hidden border-b-2 border-card"
            >
              <svg
                viewBox="0 0 240 120"
                preserveAspectRatio="xMinYMin slice"
                className="block h-30 w-full fill-none"
              >
                {/* White bars with a dark edge: they show on black plastic and on white. */}
                <path
                  d={hatchPath(240, 120, 12)}
                  stroke="#16211d"
                  strokeOpacity=".45"
                  strokeWidth="5.5"
                />
                <path d={hatchPath(240, 120, 12)} stroke="#fffdf8" strokeWidth="4" />
              </svg>
            </span>
          ) : null}
        </span>
      ) : null}
      <span
        aria-hidden
        className="absolute top-2 left-2 rounded-plate bg-card px-1.5 py-0.5 font-mono text-sm/5 font-bold text-ink"
      >
        {kg}
      </span>
    </span>
  );
}
