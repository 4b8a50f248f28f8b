"use client";

import { SwatchPaint } from "@/components/ui/swatch-paint";
import { nearestColours, type ComparedColour, type Lab } from "@/lib/core/colour";

type Named = ComparedColour & { code: string; name: string };

type Props = {
  /** Colour of the middle of the picture. */
  lab: Lab;
  palette: readonly Named[];
  value: string;
  onChoose: (code: string) => void;
};

/** The palette colours nearest to a picture, offered and never chosen by themselves. */
export function ColourHelp({ lab, palette, value, onChoose }: Props) {
  const nearest = nearestColours(lab, palette);
  if (nearest.length === 0) return null;
  return (
    <div role="group" aria-label="Colours from the photo" className="mb-2">
      <p className="mb-1.5 text-sm text-soft">
        <strong>From the photo:</strong> nearest first; the eye decides.
      </p>
      <div className="grid grid-cols-3 gap-2">
        {nearest.map(({ colour }) => (
          <button
            key={colour.code}
            type="button"
            aria-pressed={colour.code === value}
            onClick={() => onChoose(colour.code)}
            className="flex min-h-11 min-w-0 items-center gap-2 rounded-control border border-rule bg-card px-2 py-1.5 text-left text-sm/4 font-bold aria-pressed:border-act aria-pressed:bg-act-soft aria-pressed:ring-2 aria-pressed:ring-act"
          >
            <span className="size-7 shrink-0 overflow-hidden rounded-plate border border-rule">
              <SwatchPaint hex={colour.hex} width={28} height={28} />
            </span>
            <span className="min-w-0 hyphens-auto">{colour.name}</span>
          </button>
        ))}
      </div>
    </div>
  );
}
