import { Notice } from "@/components/ui/notice";
import { CLOSE_DIFFERENCE, tooClose } from "@/lib/core/colour";
import type { Colour } from "@/lib/stock/contract/palette";
import { PaletteSwatch } from "./palette-swatch";

/** Colours of the palette that are taken for each other in a bin; nothing while there are none. */
export function PaletteClosePairs({ colours }: { colours: readonly Colour[] }) {
  const pairs = tooClose(colours);
  if (pairs.length === 0) return null;
  return (
    <Notice tone="warn" title="Hard to tell apart" className="mb-4 max-w-3xl">
      <p>
        Two colours that differ by less than {CLOSE_DIFFERENCE} are taken for each other in a bin.
        Change a value, or retire one of the two.
      </p>
      <ul aria-label="Colours that are hard to tell apart" className="mt-2 grid gap-2">
        {pairs.map(({ one, other, difference }) => (
          <li key={`${one.code} ${other.code}`} className="flex items-center gap-3">
            <span className="flex shrink-0 overflow-hidden rounded-plate border border-rule">
              {[one, other].map(({ code, hex, look }) => (
                <span key={code} className="size-8">
                  <PaletteSwatch hex={hex} look={look} size={32} />
                </span>
              ))}
            </span>
            <span className="min-w-0">
              <strong>{one.name}</strong> and <strong>{other.name}</strong> differ by{" "}
              <span className="font-mono font-bold">
                {(Math.floor(difference * 10) / 10).toFixed(1)}
              </span>
            </span>
          </li>
        ))}
      </ul>
    </Notice>
  );
}
