"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { QueryProvider } from "@/components/forms/query-provider";
import { useCommand } from "@/components/forms/use-command";
import { ReservedQuestion } from "@/components/stock/reserved-question";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { EmptyState } from "@/components/ui/empty-state";
import { Notice } from "@/components/ui/notice";
import { formatKg } from "@/lib/core/mass";
import { takeAwayEndpoint, type LotToTake } from "@/lib/removals/contract/removals";
import { ScaleToday } from "../scales/scale-today";
import { rememberScale } from "../weighing/remembered-scale";
import { RemovalForm, type RemovalLists } from "./removal-form";
import {
  bodyOf,
  formErrors,
  gramsOf,
  newLoad,
  problemsOf,
  type RemovalDraft,
} from "./removal-draft";
import { useRemovalDraft } from "./use-removal-draft";

type Props = {
  helperId: string;
  lists: RemovalLists;
  /** undefined: from the reject bin. null: from stock, which lot is not said yet. */
  lot: LotToTake | null | undefined;
};

/** Records what was taken away. */
export function TakeAwayScreen({ helperId, lists, lot }: Props) {
  const router = useRouter();
  const save = useCommand(takeAwayEndpoint);
  const [asked, setAsked] = useState(false);
  const [asking, setAsking] = useState(false);
  const [reservedToo, setReservedToo] = useState(false);
  const [start] = useState<RemovalDraft>(() => ({
    how: "weighed",
    scaleId: lists.scales[0]?.id ?? "",
    loads: lot === undefined ? [newLoad(null)] : lot === null ? [] : [newLoad(lot)],
    destinationId: lists.destinations.length === 1 ? (lists.destinations[0]?.id ?? "") : "",
    day: lists.today,
    noteNumber: "",
  }));
  const way = lot === undefined ? "bin" : lot === null ? "stock" : "lot";
  const form = useRemovalDraft(helperId, way, start, lists);
  const { draft, change } = form;
  const own = problemsOf(draft, lists.tares);
  const problems = { ...(asked ? own : {}), ...formErrors(save.fieldErrors) };
  const loads = draft.loads.map((load) =>
    gramsOf(draft, load, load.lot ? load.lot.heldGrams : lists.binGrams, lists.tares),
  );
  const total = loads.reduce<number>((sum, grams) => sum + (grams ?? 0), 0);

  async function send(confirmedAbove: boolean, knowingly = reservedToo) {
    setAsked(true);
    const body = bodyOf(draft, lists.tares);
    if (!body) {
      focusFirst(own);
      return;
    }
    const result = await save.send(
      { ...body, confirmedAbove, reservedToo: knowingly },
      { requestId: form.requestId },
    );
    const refused = result.kind === "refused" ? result.problem.code : null;
    setAsking(refused === "removal-above-book");
    if (refused === "request-id-reused") form.renew();
    if (result.kind !== "done") return;
    form.forget();
    router.push(`/removals/${result.receipt.id}`);
    router.refresh();
  }

  function choose(scaleId: string) {
    change({ ...draft, scaleId });
    rememberScale(scaleId);
  }

  if (lists.destinations.length === 0) {
    return (
      <EmptyState title="No destination yet">
        A coordinator enters who takes what leaves the shed: the receiver, the carrier and their
        numbers. Then it can be recorded here.
      </EmptyState>
    );
  }
  return (
    <QueryProvider>
      <form
        noValidate
        className="flex grow flex-col rail:max-w-xl"
        onSubmit={(event) => {
          event.preventDefault();
          void send(false);
        }}
      >
        {form.kept ? (
          <Notice
            tone="info"
            title="Typed before, not saved"
            live="status"
            className="mb-4"
            action={
              <Button
                variant="quiet"
                size="small"
                onClick={() => {
                  form.startOver();
                  save.reset();
                  setAsked(false);
                }}
              >
                Start over
              </Button>
            }
          >
            It was kept on this device.
          </Notice>
        ) : null}
        <RemovalForm
          draft={draft}
          lists={lists}
          problems={problems}
          onDraft={(next) => {
            change(next);
            save.reset();
          }}
          scaleNote={<ScaleToday scaleId={draft.scaleId} onScale={choose} />}
        />
        <div className="mt-4">
          <ReservedQuestion
            command={save}
            onTake={() => {
              setReservedToo(true);
              void send(false, true);
            }}
          />
          {asking || save.problem?.code === "lot-reserved" ? null : (
            <CommandNotice command={save} shownFields={shownFields(problems)} />
          )}
        </div>
        <ActionBar>
          <Button type="submit" className="grow" busy={save.pending}>
            {total > 0 ? `Take away ${formatKg(total)} kg` : "Take away"}
          </Button>
        </ActionBar>
      </form>
      {asking && save.problem ? (
        <Dialog
          open
          role="alertdialog"
          title="More than the book has"
          onClose={() => setAsking(false)}
          actions={
            <>
              <Button variant="quiet" onClick={() => setAsking(false)}>
                Weigh again
              </Button>
              <Button busy={save.pending} onClick={() => void send(true)}>
                It stays so: take away {formatKg(total)} kg
              </Button>
            </>
          }
        >
          <p>{save.problem.detail}</p>
          <p className="mt-2 text-soft">
            Confirmed, the rest goes down as difference, and nothing stops.
          </p>
        </Dialog>
      ) : null}
    </QueryProvider>
  );
}

/** Paths as a problem document has them, of what stands beside a field. */
function shownFields(problems: Readonly<Record<string, string>>): string[] {
  return Object.keys(problems).flatMap((name) => [
    name,
    `taking.${name.replace(/\.gross$/, ".grossMilligrams")}`,
  ]);
}

function focusFirst(problems: Readonly<Record<string, string>>): void {
  const [first] = Object.keys(problems);
  if (first) document.querySelector<HTMLElement>(`[name="${first}"]`)?.focus();
}
