"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import { correctRemovalEndpoint } from "@/lib/removals/contract/removals";
import { ReasonField, reasonProblem } from "./reason-field";
import { RemovalForm, type RemovalLists } from "./removal-form";
import { bodyOf, formErrors, gramsOf, problemsOf, type RemovalDraft } from "./removal-draft";

type Props = {
  removalId: string;
  /** What the wrong one says, to be changed. */
  first: RemovalDraft;
  lists: RemovalLists;
  /** Number of the receipt that goes along. */
  receiptNumber: string | null;
};

/** Says what should have been recorded, or that nothing was taken away. */
export function CorrectScreen({ removalId, first, lists, receiptNumber }: Props) {
  const router = useRouter();
  const save = useCommand(correctRemovalEndpoint);
  const [draft, setDraft] = useState(first);
  const [nothing, setNothing] = useState(false);
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const own = problemsOf(draft, lists.tares);
  const errors = formErrors(save.fieldErrors);
  const total = draft.loads.reduce(
    (sum, load) =>
      sum +
      (gramsOf(draft, load, load.lot ? load.lot.heldGrams : lists.binGrams, lists.tares) ?? 0),
    0,
  );
  async function send() {
    setAsked(true);
    const replacement = nothing ? null : bodyOf(draft, lists.tares);
    if (reasonProblem(reason) || (!nothing && !replacement)) return;
    const result = await save.send({ id: removalId, reason, replacement });
    if (result.kind !== "done") return;
    router.push(`/removals/${result.receipt.replacementId ?? removalId}`);
    router.refresh();
  }
  return (
    <form
      noValidate
      className="flex grow flex-col rail:max-w-xl"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <div className="grid gap-5">
        {receiptNumber === null ? null : (
          <Notice tone="info" title={`Receipt ${receiptNumber} goes along`}>
            It is taken back with this removal, and entered again with its own number, day and
            weight if it was passed on.
          </Notice>
        )}
        <CheckField
          label="Nothing was taken away"
          hint="Takes the removal back, with nothing in its place."
          checked={nothing}
          onChange={(event) => setNothing(event.target.checked)}
        />
        {nothing ? null : (
          <RemovalForm
            draft={draft}
            lists={lists}
            problems={{ ...(asked ? own : {}), ...errors }}
            onDraft={(next) => {
              setDraft(next);
              save.reset();
            }}
            scaleNote={null}
          />
        )}
        <ReasonField value={reason} onValue={setReason} asked={asked} error={errors.reason} />
        <CommandNotice
          command={save}
          shownFields={Object.keys(save.fieldErrors).filter(
            (path) => path === "reason" || path.startsWith("replacement."),
          )}
        />
      </div>
      <div className="h-4" />
      <ActionBar>
        <Button type="submit" className="grow" busy={save.pending}>
          {nothing
            ? "Take the removal back"
            : `Correct to ${total > 0 ? `${formatKg(total)} kg` : "this"}`}
        </Button>
      </ActionBar>
    </form>
  );
}
