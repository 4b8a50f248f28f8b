"use client";

import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { questionWords } from "./question-words";
import type { Asking } from "./use-weigh-in";

type Props = { asking: Asking; onYes(): void; onNo(): void; pending: boolean; zone: string };

/** What is implausible is asked once, never refused. */
export function AskDialog({ asking, onYes, onNo, pending, zone }: Props) {
  return (
    <Dialog
      open
      onClose={onNo}
      role="alertdialog"
      title="Is that right?"
      actions={
        <>
          <Button variant="quiet" onClick={onNo}>
            No, read it again
          </Button>
          <Button onClick={onYes} busy={pending}>
            Yes, save it
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        {asking.questions.map((question) => (
          <p key={question.question}>{questionWords(question, zone)}</p>
        ))}
      </div>
    </Dialog>
  );
}
