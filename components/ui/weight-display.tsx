import type { ReactNode } from "react";
import { TONE_TEXT, type Tone } from "./figure";

type WeightDisplayProps = {
  label: ReactNode;
  /** Formatted already: "2.340"; "–" while there is none. */
  value: string;
  unit?: string;
  tone?: Tone;
  /** Largest figure in px; a longer figure shrinks so that it never leaves its ticket. */
  largest?: number;
  /** Read aloud when it changes. */
  live?: boolean;
};

/** The largest thing on its screen: one weight in mono. */
export function WeightDisplay({
  label,
  value,
  unit = "kg",
  tone = "ink",
  largest = 72,
  live = false,
}: WeightDisplayProps) {
  // A mono figure is about 0.66 em wide with our spacing; the unit takes 1.2 em of its own smaller size.
  const widthInEm = Math.max(4, value.length) * 0.68 + 0.62;
  return (
    <div className="@container min-w-0">
      <div className="text-xs font-bold text-soft">{label}</div>
      <output
        aria-live={live ? "polite" : "off"}
        style={{ fontSize: `min(${largest}px, ${(100 / widthInEm).toFixed(2)}cqi)` }}
        className={`block font-mono leading-none font-bold whitespace-nowrap ${TONE_TEXT[tone]}`}
      >
        {value}
        <span className="font-body text-[0.36em] font-bold tracking-normal">&nbsp;{unit}</span>
      </output>
    </div>
  );
}
