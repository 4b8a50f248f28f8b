import type { ReactNode } from "react";

/**
 * The foot of a capture page: its one action, under the thumb. On a phone it stands on the bottom bar and
 * stays in sight; from 900 px it is the last row of the page.
 */
export function ActionBar({ children }: { children: ReactNode }) {
  return (
    <div className="sticky bottom-(--bar-height) z-20 -mx-4 mt-auto flex gap-2.5 border-t border-rule bg-card px-4 py-3 *:min-w-0 rail:static rail:max-w-xl rail:mx-0 rail:mt-6 rail:border-0 rail:bg-paper rail:px-0 print:hidden">
      {children}
    </div>
  );
}
