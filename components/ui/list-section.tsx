import type { ReactNode } from "react";

type ListSectionProps = { title: string; action: ReactNode; children: ReactNode };

/** A part of a page with a heading, its action, and a list. */
export function ListSection({ title, action, children }: ListSectionProps) {
  return (
    <section aria-label={title} className="mb-9">
      <div className="mb-3 flex flex-wrap items-end justify-between gap-3">
        <h2 className="text-xl">{title}</h2>
        {action ? <div className="flex flex-wrap gap-2">{action}</div> : null}
      </div>
      <div className="grid gap-3">{children}</div>
    </section>
  );
}
