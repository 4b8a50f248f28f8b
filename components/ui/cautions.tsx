import type { ReactNode } from "react";
import { Notice } from "./notice";

type Props = {
  /** Before the list: what matters most. */
  lead?: ReactNode;
  lines: readonly string[];
  className?: string;
};

/** Beside the work, never a box to tick. The machine's manual and local rules come first. */
export function Cautions({ lead, lines, className }: Props) {
  return (
    <Notice tone="warn" title="Take care" className={className}>
      {lead ? <p className="font-bold">{lead}</p> : null}
      <ul className="grid list-outside list-disc gap-0.5 pl-5">
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <p className="mt-1 text-sm text-soft">
        The machine&apos;s manual, local rules and licensed practice come before this page.
      </p>
    </Notice>
  );
}
