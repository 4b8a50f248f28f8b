"use client";

import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { LossCause } from "@/lib/ledger/terms";
import {
  correctSortingEndpoint,
  type CorrectSortingReceipt,
} from "@/lib/sorting/contract/sortings";
import type { SortingPage } from "@/lib/sorting/queries/session-page";
import { LaterUsesList } from "../ledger/later-uses-list";
import { ReasonField, reasonProblem } from "../removals/reason-field";
import { useDeskLists } from "../weighing/use-desk-lists";
import { boardOf } from "./board";
import { CorrectedSession } from "./corrected-session";
import { draftFrom } from "./from-fractions";
import { LeftoverDialog } from "./leftover-dialog";
import { PilesBoard } from "./piles-board";
import { useRejectReasons } from "./use-table";

type Props = { session: SortingPage; timeZone: string };

const TABLE = "replacement.";

/** The same table with what was saved, to say what should have been; or that the bags wait again. */
export function CorrectSession({ session, timeZone }: Props) {
  const lists = useDeskLists();
  const reasons = useRejectReasons();
  const save = useCommand(correctSortingEndpoint);
  const [draft, setDraft] = useState(() =>
    draftFrom(session.fractions, session.scale?.id ?? "", { lots: "own" }),
  );
  const [nothing, setNothing] = useState(false);
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const [asking, setAsking] = useState(false);
  const [done, setDone] = useState<CorrectSortingReceipt | null>(null);
  if (done) return <CorrectedSession receipt={done} timeZone={timeZone} />;
  if (!lists.ready || !reasons.data) {
    return <Skeleton shape="tickets" count={3} label="Loading the table" />;
  }

  const board = boardOf(draft, session.bags, lists, session.scale?.id ?? null);
  const { scale, body, judged } = board;
  const errors = Object.fromEntries(
    Object.entries(save.fieldErrors).map(([field, words]) => [
      field.startsWith(TABLE) ? field.slice(TABLE.length) : field,
      words,
    ]),
  );

  async function send(answer: { cause: LossCause | null; confirmedAbove: boolean }) {
    const replacement =
      nothing || !body || !scale
        ? null
        : { scaleId: scale.id, occurredAt: session.occurredAt, ...body, ...answer };
    const result = await save.send({ id: session.id, reason, replacement });
    setAsking(false);
    if (result.kind !== "done") return;
    setDone(result.receipt);
    window.scrollTo({ top: 0 });
  }

  function submit() {
    setAsked(true);
    if (reasonProblem(reason)) {
      document.querySelector<HTMLInputElement>('[name="reason"]')?.focus();
      return;
    }
    if (!nothing && judged.verdict.kind !== "within") setAsking(true);
    else void send({ cause: null, confirmedAbove: false });
  }

  const incomplete = !nothing && (body === null || board.count === 0);
  return (
    <div className="grid gap-4 rail:max-w-3xl">
      {session.later.count > 0 ? (
        <Notice tone="warn" title="Used since">
          The correction goes through all the same. These stay as they are; what a lot no longer
          holds is written down as difference.
          <LaterUsesList later={session.later} timeZone={timeZone} />
        </Notice>
      ) : null}
      <CheckField
        label="Take it back, with nothing in its place"
        hint={session.bags.length === 1 ? "The bag waits again." : "All of its bags wait again."}
        checked={nothing}
        onChange={(event) => {
          setNothing(event.target.checked);
          save.reset();
        }}
      />
      {nothing ? null : (
        <PilesBoard
          draft={draft}
          board={board}
          bagCount={session.bags.length}
          lists={lists}
          reasons={reasons.data.items}
          errors={errors}
          onDraft={(next) => {
            setDraft(next);
            save.reset();
          }}
        />
      )}
      <ReasonField value={reason} onValue={setReason} asked={asked} error={errors.reason} />
      <CommandNotice command={save} shownFields={["reason"]} />
      <ActionBar>
        <Button className="grow" busy={save.pending} disabled={incomplete} onClick={submit}>
          {nothing ? "Take the sorting back" : incomplete ? "A pile is not complete" : "Correct it"}
        </Button>
      </ActionBar>
      {asking ? (
        <LeftoverDialog
          differenceGrams={judged.verdict.differenceGrams}
          toleranceMilligrams={judged.toleranceMilligrams}
          busy={save.pending}
          onSave={(cause) => void send({ cause, confirmedAbove: cause === null })}
          onClose={() => setAsking(false)}
        />
      ) : null}
    </div>
  );
}
