import type { ReactNode } from "react";

export type Tone = "ink" | "soft" | "ok" | "warn" | "bad";

export const TONE_TEXT: Record<Tone, string> = {
  ink: "text-ink",
  soft: "text-soft",
  ok: "text-ok",
  warn: "text-warn",
  bad: "text-bad",
};

type FigureProps = {
  label: ReactNode;
  /** Formatted already: "176.440". */
  value: ReactNode;
  unit?: string;
  tone?: Tone;
  size?: "small" | "large";
  align?: "left" | "right";
  note?: ReactNode;
};

/** A label and its figure in mono. */
export function Figure({
  label,
  value,
  unit,
  tone = "ink",
  size = "large",
  align = "left",
  note,
}: FigureProps) {
  return (
    <div className={`min-w-0 ${align === "right" ? "text-right" : ""}`}>
      <div className="text-xs font-bold text-soft">{label}</div>
      <div
        className={`font-mono font-bold whitespace-nowrap ${TONE_TEXT[tone]} ${size === "large" ? "text-xl" : "text-base"}`}
      >
        {value}
        {unit ? (
          <span className="font-body text-[0.75em] font-bold tracking-normal">&nbsp;{unit}</span>
        ) : null}
      </div>
      {note ? <div className="text-xs text-soft">{note}</div> : null}
    </div>
  );
}
