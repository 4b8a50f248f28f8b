"use client";

import { useEffect, useId, useLayoutEffect, useRef, type ReactNode } from "react";
import { Icon } from "./icon";

type DialogProps = {
  open: boolean;
  /** Called for Esc, the close button and the phone's back gesture. The parent sets `open` to false. */
  onClose: () => void;
  title: ReactNode;
  children: ReactNode;
  /** Buttons at the foot. */
  actions?: ReactNode;
  /** "alertdialog" for a question that must be answered before going on. */
  role?: "dialog" | "alertdialog";
};

/**
 * The browser's own modal dialog: it keeps the focus inside, closes on Esc and gives the focus back to what
 * opened it. On a phone it comes up from below, where the thumb is.
 */
export function Dialog({ open, onClose, title, children, actions, role }: DialogProps) {
  const box = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const element = box.current;
    if (!element) return;
    if (open && !element.open) element.showModal();
    if (!open && element.open) element.close();
  }, [open]);

  // A dialog that is taken off the page while open would leave the focus nowhere: it closes first.
  useLayoutEffect(() => {
    const element = box.current;
    return () => element?.close();
  }, []);

  return (
    <dialog
      ref={box}
      role={role}
      aria-labelledby={titleId}
      onCancel={(event) => {
        // A file chooser inside also fires "cancel"; only the dialog's own closes it.
        if (event.target !== box.current) return;
        event.preventDefault();
        onClose();
      }}
      onClose={(event) => {
        // A form with method=dialog, or a browser that closes on its own: keep the parent's state true.
        if (event.target === box.current && open && !box.current.open) onClose();
      }}
      className="m-auto mb-0 max-h-[92dvh] w-full max-w-none overflow-y-auto rounded-t-ticket border border-rule bg-card text-ink backdrop:bg-veil open:flex open:flex-col open:motion-safe:animate-rise wide:mb-auto wide:max-w-xl wide:rounded-ticket"
    >
      <div className="sticky top-0 z-10 flex items-start justify-between gap-3 border-b border-rule bg-card py-2 pr-2 pl-5">
        <h2 id={titleId} className="py-2 text-xl">
          {title}
        </h2>
        <button
          type="button"
          onClick={onClose}
          aria-label="Close"
          className="grid size-11 shrink-0 place-items-center rounded-control hover:bg-well"
        >
          <Icon name="close" />
        </button>
      </div>
      <div className="grow px-5 py-4">{children}</div>
      {actions ? (
        <div className="sticky bottom-0 flex flex-wrap justify-end gap-2.5 border-t border-rule bg-card px-5 pt-3 pb-[calc(0.75rem+env(safe-area-inset-bottom,0px))] max-wide:*:grow">
          {actions}
        </div>
      ) : null}
    </dialog>
  );
}
