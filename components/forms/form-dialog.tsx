import { useId, type BaseSyntheticEvent, type ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import type { ProblemDocument } from "@/lib/core/errors";
import { CommandNotice } from "./command-notice";

type Props = {
  title: ReactNode;
  /** Words of the button that sends. */
  submit: ReactNode;
  onSubmit: (event: BaseSyntheticEvent) => Promise<void>;
  onClose: () => void;
  command: { pending: boolean; problem: ProblemDocument | null; unreachable: boolean };
  /** Fields that say a refusal themselves. */
  shownFields: readonly string[];
  /** The fields. */
  children: ReactNode;
  /** Below the form: what is looked at, not sent. */
  after?: ReactNode;
};

/** One form in a dialog: its fields, why it was refused, a way out and the button that sends it. */
export function FormDialog({
  title,
  submit,
  onSubmit,
  onClose,
  command,
  shownFields,
  children,
  after,
}: Props) {
  const id = useId();
  return (
    <Dialog
      open
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button variant="quiet" onClick={onClose}>
            Cancel
          </Button>
          <Button type="submit" form={id} busy={command.pending}>
            {submit}
          </Button>
        </>
      }
    >
      <form
        id={id}
        noValidate
        className="grid gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          // Enter in a field sends too, also while the button shows that it is on its way.
          if (!command.pending) void onSubmit(event);
        }}
      >
        <CommandNotice command={command} shownFields={shownFields} />
        {children}
      </form>
      {after}
    </Dialog>
  );
}
