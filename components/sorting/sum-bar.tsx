import { SwatchPaint, type SwatchPattern } from "@/components/ui/swatch-paint";

export type Segment = { key: string; grams: number; hex: string | null; pattern: SwatchPattern };

/** The piles against the net, to scale. Ornament: the figures beside it say the same. */
export function SumBar({ segments, netGrams }: { segments: readonly Segment[]; netGrams: number }) {
  const sum = segments.reduce((total, segment) => total + segment.grams, 0);
  const whole = Math.max(sum, netGrams, 1);
  return (
    <div aria-hidden className="flex h-6 gap-0.5 overflow-hidden rounded-plate bg-well">
      {segments.map((segment) => (
        <span
          key={segment.key}
          style={{ width: `${((segment.grams / whole) * 100).toFixed(3)}%` }}
          className="block h-full min-w-1 border-y border-edge/40"
        >
          <SwatchPaint hex={segment.hex} pattern={segment.pattern} width={200} height={24} />
        </span>
      ))}
    </div>
  );
}
