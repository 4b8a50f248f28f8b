import type { ReactNode } from "react";

export type NoticeTone = "ok" | "warn" | "bad" | "info";

const TONES: Record<NoticeTone, { box: string; word: string; said: string }> = {
  ok: { box: "bg-ok-soft border-ok", word: "text-ok", said: "Done" },
  warn: { box: "bg-warn-soft border-warn", word: "text-warn", said: "Check" },
  bad: { box: "bg-bad-soft border-bad", word: "text-bad", said: "Refused" },
  info: { box: "bg-card border-rule", word: "text-ink", said: "Note" },
};

type NoticeProps = {
  tone: NoticeTone;
  /** The word or short sentence beside the colour; each tone has its own when left out. */
  title?: ReactNode;
  children?: ReactNode;
  /** A button or link. */
  action?: ReactNode;
  /** Read aloud when it appears: "status" waits its turn, "alert" does not. */
  live?: "status" | "alert";
  className?: string;
};

/** What happened, what was kept, what to do. Colour never stands without a word. */
export function Notice({ tone, title, children, action, live, className = "" }: NoticeProps) {
  const look = TONES[tone];
  return (
    <div
      role={live}
      className={`flex flex-wrap items-center gap-x-4 gap-y-2 rounded-control border px-4 py-3 ${look.box} ${className}`}
    >
      <div className="min-w-0 grow basis-52 text-ink">
        <strong className={`font-bold ${look.word}`}>{title ?? look.said}</strong>
        {children ? <div className="mt-0.5">{children}</div> : null}
      </div>
      {action ? <div className="flex flex-wrap gap-2">{action}</div> : null}
    </div>
  );
}
