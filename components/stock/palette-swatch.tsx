import { seedOf } from "@/lib/core/random";
import { SwatchPaint } from "@/components/ui/swatch-paint";
import type { ColourLook } from "@/lib/stock/terms";
import { PATTERNS } from "./patterns";

type PaletteSwatchProps = { hex: string; look: ColourLook; size: number };

/** A palette colour as an area of flakes. Its name stands beside it. */
export function PaletteSwatch({ hex, look, size }: PaletteSwatchProps) {
  return (
    <SwatchPaint hex={hex} pattern={PATTERNS[look]} seed={seedOf(hex)} width={size} height={size} />
  );
}
