import Link, { type LinkProps } from "next/link";
import type { ReactNode } from "react";

type PageHeaderProps<RouteType> = {
  title: ReactNode;
  lead?: ReactNode;
  /** Buttons; at most one of them `act`. */
  actions?: ReactNode;
  /** Figures at the right, from 700 px; under the lead on a phone. */
  figures?: ReactNode;
  back?: { href: LinkProps<RouteType>["href"]; label: string };
  /** The phone's top bar already shows this title, so it is only read aloud there. */
  titleInBar?: boolean;
};

/** The head of a page: its one h1, what it is for, its figures and actions. */
export function PageHeader<RouteType>({
  title,
  lead,
  actions,
  figures,
  back,
  titleInBar = false,
}: PageHeaderProps<RouteType>) {
  const bare = titleInBar && !lead && !actions && !figures && !back;
  return (
    <header
      className={`flex flex-wrap items-end justify-between gap-x-8 gap-y-4 rail:mb-6 rail:pt-7 ${bare ? "max-rail:contents" : "mb-4 pt-2"}`}
    >
      <div className={`max-w-[70ch] min-w-0 grow basis-64 ${bare ? "max-rail:contents" : ""}`}>
        {back ? (
          <p className="-mt-2 print:hidden">
            <Link
              href={back.href}
              className="link inline-flex min-h-11 items-center text-sm font-bold"
            >
              {back.label}
            </Link>
          </p>
        ) : null}
        <h1
          className={`text-2xl wide:text-3xl ${titleInBar ? "max-rail:sr-only print:not-sr-only" : ""}`}
        >
          {title}
        </h1>
        {lead ? <p className="mt-1 text-soft">{lead}</p> : null}
      </div>
      {figures ? (
        <div className="flex flex-wrap gap-x-7 gap-y-3 max-wide:*:text-left">{figures}</div>
      ) : null}
      {actions ? (
        <div className="flex flex-wrap gap-2.5 max-wide:w-full max-wide:*:grow">{actions}</div>
      ) : null}
    </header>
  );
}
