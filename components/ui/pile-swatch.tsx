import { SwatchPaint, type SwatchPattern } from "./swatch-paint";

type PileSwatchProps = {
  hex?: string | null;
  pattern?: SwatchPattern;
  seed?: number;
  size?: 24 | 44;
};

/** A small heap of one colour beside a pile's or lot's name. */
export function PileSwatch({ hex, pattern, seed = 1, size = 44 }: PileSwatchProps) {
  return (
    <span
      style={{ width: size, height: size }}
      // The hairline is the edge that white needs on a light card, and black on a dark one.
      className={`inline-block shrink-0 overflow-hidden border border-rule align-middle ${size === 24 ? "rounded-plate" : "rounded-control"}`}
    >
      <SwatchPaint
        hex={hex}
        pattern={pattern}
        seed={size === 24 ? undefined : seed}
        width={size}
        height={size}
      />
    </span>
  );
}
