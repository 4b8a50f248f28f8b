import type { ReactNode } from "react";
import { BismarMark } from "@/components/ui/bismar-mark";
import type { Role } from "@/lib/core/permissions";
import { BarTitle } from "./bar-title";
import { MoreButton } from "./more-button";
import { PlaceLink } from "./place-link";
import { barFor, placesFor } from "./places";
import { QueueSlot } from "./queue-slot";
import { SignOutButton } from "./sign-out-button";
import { SkipLink } from "./skip-link";

type ShellProps = {
  role: Role;
  schemeName: string;
  /** The queue's indicator. */
  queue?: ReactNode;
  children: ReactNode;
};

/**
 * The frame of every signed-in page. It names no person: the pages that capture are kept on shared phones.
 */
export function Shell({ role, schemeName, queue, children }: ShellProps) {
  const places = placesFor(role);
  const { bar, more } = barFor(role);
  return (
    <div className="min-h-dvh rail:grid rail:grid-cols-[13rem_minmax(0,1fr)]">
      <SkipLink />
      <aside className="hidden border-r border-rule rail:sticky rail:top-0 rail:flex rail:h-dvh rail:flex-col rail:overflow-y-auto print:hidden!">
        <div className="px-5 pt-5 pb-4">
          <div className="flex items-center gap-2.5">
            <BismarMark />
            <span className="font-heading text-xl font-bold">Bismar</span>
          </div>
          <p className="mt-1 text-xs text-soft">{schemeName}</p>
        </div>
        <nav aria-label="Places" className="px-3.5">
          <ul className="grid gap-0.5">
            {places.map((place) => (
              <li key={place.id}>
                <PlaceLink place={place} shape="rail" />
              </li>
            ))}
          </ul>
        </nav>
        <div className="mt-4 px-3.5 pb-20">
          <SignOutButton size="small" />
        </div>
      </aside>
      <div className="flex min-h-dvh min-w-0 flex-col">
        <header className="flex min-h-14 items-center gap-3 px-4 py-1.5 rail:contents print:hidden">
          <span className="flex min-w-0 items-center gap-2.5 rail:hidden">
            <BismarMark />
            <BarTitle places={places} />
          </span>
          <QueueSlot>{queue}</QueueSlot>
        </header>
        <main
          id="content"
          tabIndex={-1}
          className="mx-auto flex w-full max-w-7xl min-w-0 grow flex-col px-4 pb-(--bar-height) outline-none rail:px-9 rail:pb-12 print:p-0"
        >
          {children}
        </main>
      </div>
      <nav
        aria-label="Places"
        className="fixed inset-x-0 bottom-0 z-30 border-t border-rule bg-card px-1.5 pt-1.5 pb-[calc(0.375rem+env(safe-area-inset-bottom,0px))] rail:hidden print:hidden"
      >
        <div className="mx-auto grid max-w-xl auto-cols-fr grid-flow-col gap-1">
          {bar.map((place) => (
            <PlaceLink key={place.id} place={place} shape="bar" />
          ))}
          <MoreButton places={more} />
        </div>
      </nav>
    </div>
  );
}
