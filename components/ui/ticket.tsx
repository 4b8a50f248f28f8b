import type { ReactNode } from "react";

type TicketProps = {
  /** Above the tear line. Without it the ticket is one plain card. */
  stub?: ReactNode;
  children: ReactNode;
  as?: "div" | "section" | "article" | "li";
  /** Accessible name, when it is a section of its own. */
  label?: string;
  padding?: "normal" | "none";
  className?: string;
};

/** The half circle punched out of a side; its straight edge covers the ticket's own border. */
function Notch({ side }: { side: "left" | "right" }) {
  return (
    <svg
      aria-hidden
      viewBox="0 0 12 24"
      className={`absolute top-1/2 h-6 w-3 -translate-y-1/2 fill-paper stroke-rule print:hidden ${side === "left" ? "-left-px" : "-right-px -scale-x-100"}`}
    >
      <path d="M0 .5A11.5 11.5 0 0 1 0 23.5" />
    </svg>
  );
}

/** The trade's own document: a card, with `stub` a tear line and two punched notches. */
export function Ticket({
  stub,
  children,
  as: Element = "div",
  label,
  padding = "normal",
  className = "",
}: TicketProps) {
  const inset = padding === "none" ? "" : "px-4 py-4 wide:px-5";
  return (
    <Element
      aria-label={label}
      className={`relative min-w-0 rounded-ticket border border-rule bg-card text-ink print:break-inside-avoid ${className}`}
    >
      {stub ? (
        <>
          <div className={inset}>{stub}</div>
          <div className="relative h-0">
            <Notch side="left" />
            <Notch side="right" />
            <div className="mx-5 border-t-2 border-dashed border-rule" />
          </div>
        </>
      ) : null}
      <div className={inset}>{children}</div>
    </Element>
  );
}
