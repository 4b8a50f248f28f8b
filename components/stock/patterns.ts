import type { SwatchPattern } from "@/components/ui/swatch-paint";
import type { ColourLook } from "@/lib/stock/terms";

/** How a palette colour's look is drawn. */
export const PATTERNS: Record<ColourLook, SwatchPattern> = {
  solid: "plain",
  clear: "clear",
  mixed: "mixed",
};
