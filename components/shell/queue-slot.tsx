import type { ReactNode } from "react";

/**
 * Where the queue's indicator stands: at the right of the phone's top bar, from 900 px at the foot of the
 * rail. One element for both, so that the indicator runs once.
 */
export function QueueSlot({ children }: { children?: ReactNode }) {
  return (
    <div className="ml-auto flex min-w-0 shrink-0 items-center rail:fixed rail:bottom-4 rail:left-3.5 rail:z-30 rail:w-45 rail:*:w-full">
      {children}
    </div>
  );
}
