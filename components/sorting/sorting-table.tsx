"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import { useCommand } from "@/components/forms/use-command";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { formatCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import type { LossCause } from "@/lib/ledger/terms";
import type { closeSortingEndpoint, RejectReason } from "@/lib/sorting/contract/sortings";
import { CLOSE_SORTING_ADDRESS } from "@/lib/sorting/terms";
import type { DeskLists } from "../weighing/use-desk-lists";
import { boardOf } from "./board";
import type { Draft } from "./draft";
import { keepTable } from "./kept-tables";
import { LeftoverDialog } from "./leftover-dialog";
import { OvertakenDialog } from "./overtaken-dialog";
import { PilesBoard } from "./piles-board";
import { SessionNotices } from "./session-notices";
import { SortingPhotos } from "./sorting-photos";
import { NOTHING_KEPT } from "./session-state";
import { TableBags } from "./table-bags";
import type { Session } from "./use-session";
import { useBags } from "./use-table";

type Props = {
  id: string;
  session: Session;
  helperId: string;
  timeZone: string;
  lists: DeskLists;
  reasons: readonly RejectReason[];
};

type Answer = { cause: LossCause | null; confirmedAbove: boolean };

/** Bags are tipped out: piles and rejects are weighed until they add up to what the bags held. */
export function SortingTable({ id, session, helperId, timeZone, lists, reasons }: Props) {
  const router = useRouter();
  const save = useCommand<typeof closeSortingEndpoint>(CLOSE_SORTING_ADDRESS);
  const [asking, setAsking] = useState(false);
  const [offline, setOffline] = useState(false);
  const { state } = session;
  const { codes, draft } = state.table;
  const found = useBags(codes);
  const board = boardOf(draft, found.bags ?? [], lists, found.known[0]?.scaleId ?? null);
  const { scale, body, count, judged } = board;

  const { over } = state;
  const untouched = over === "saved" && count === 0;
  useEffect(() => {
    // Nothing of one's own would be lost: straight to what was saved.
    if (untouched) router.replace(`/sorting/sessions/${id}`);
  }, [untouched, id, router]);

  function change(next: Draft) {
    session.type({ codes, draft: next });
    setOffline(false);
    save.reset();
  }
  function changeCodes(next: readonly string[]) {
    session.type({ codes: next, draft });
    save.reset();
  }

  async function send(answer: Answer) {
    if (!body || !scale) return;
    // What is on the server first: should another have changed it, that is looked at before anything is saved.
    const kept = await session.keep();
    setOffline(kept === "unreachable");
    if (kept !== "kept") {
      setAsking(false);
      window.scrollTo({ top: 0 });
      return;
    }
    const occurredAt = instant(Date.now());
    const result = await save.send(
      { codes: [...codes], scaleId: scale.id, ...body, ...answer, occurredAt },
      { requestId: id, pressedAt: "occurredAt" },
    );
    setAsking(false);
    if (result.kind === "refused") session.hearRefusal(result.problem);
    setOffline(result.kind === "unreachable");
    if (result.kind !== "done") {
      // What is said of it stands above the piles; the button is at the foot.
      window.scrollTo({ top: 0 });
      return;
    }
    session.forget();
    router.replace(`/sorting/sessions/${id}`);
  }

  function close() {
    if (judged.verdict.kind === "within") void send({ cause: null, confirmedAbove: false });
    else setAsking(true);
  }

  async function putAside() {
    await session.keep();
    router.push("/sorting");
  }

  function goOn() {
    const own = newId();
    keepTable(helperId, { id: own, table: state.table, base: NOTHING_KEPT });
    session.forget();
    router.replace(`/sorting/table/${own}`);
  }

  const points = [...new Set(found.known.flatMap(({ pointName }) => pointName ?? []))];
  const refusedField = Object.values(save.fieldErrors)[0];
  return (
    <>
      <PageHeader
        title={
          codes.length === 1
            ? `Sorting ${formatCode(codes[0] ?? "")}`
            : `Sorting ${codes.length} bags`
        }
        lead={points.length > 0 ? points.join(", ") : undefined}
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      <div className="grid items-start gap-4 rail:grid-cols-[minmax(0,38rem)_minmax(0,1fr)] rail:gap-x-10">
        <div className="grid min-w-0 gap-4">
          <SessionNotices
            state={state}
            id={id}
            onTakeOff={(code) => changeCodes(codes.filter((other) => other !== code))}
            onTakeAside={session.takeAside}
            onGoOn={goOn}
          />
          {offline ? (
            <Notice tone="warn" title="The server did not answer" live="alert">
              Saving needs the network. Everything is kept on this phone; press again when there is
              signal. Should it have arrived, it is not counted twice.
            </Notice>
          ) : save.problem && !over && !state.refused ? (
            <Notice tone="bad" title="Nothing was saved" live="alert">
              {refusedField ?? save.problem.detail}
            </Notice>
          ) : null}
          {found.bags ? (
            <PilesBoard
              draft={draft}
              board={board}
              bagCount={codes.length}
              lists={lists}
              reasons={reasons}
              errors={save.fieldErrors}
              onDraft={over ? null : change}
            />
          ) : (
            <Notice tone="warn" title="What the bags held is not known yet" live="status">
              {found.error ? "The server did not answer; it is asked again. " : ""}What was weighed
              is kept on this phone.
            </Notice>
          )}
        </div>
        <div className="grid min-w-0 gap-4">
          <TableBags
            codes={codes}
            known={found.known}
            refused={state.refused}
            onCodes={over ? null : changeCodes}
          />
          <SortingPhotos
            id={id}
            helperId={helperId}
            timeZone={timeZone}
            what={codes.length === 1 ? `Bag ${formatCode(codes[0] ?? "")}` : "Bags on the table"}
            grams={found.bags ? judged.netGrams : null}
          />
          {over ? null : (
            <div className="flex flex-wrap items-center justify-between gap-x-4">
              <p role="status" className="text-sm text-soft">
                {keptWords(session)}
              </p>
              <Button variant="quiet" size="small" onClick={() => void putAside()}>
                Put aside
              </Button>
            </div>
          )}
        </div>
      </div>
      {count > 0 && !over ? (
        <ActionBar>
          <Button
            className="grow"
            onClick={close}
            busy={save.pending || (session.keeping && asking)}
            disabled={!body || !scale || !found.bags || state.refused !== null}
          >
            {saveWords(body !== null, count, codes.length)}
          </Button>
        </ActionBar>
      ) : null}
      {state.theirs ? (
        <OvertakenDialog
          who={state.theirs.who}
          mine={state.table}
          theirs={state.theirs.table}
          lists={lists}
          reasons={reasons}
          onChoose={session.choose}
        />
      ) : asking ? (
        <LeftoverDialog
          differenceGrams={judged.verdict.differenceGrams}
          toleranceMilligrams={judged.toleranceMilligrams}
          busy={save.pending || session.keeping}
          onSave={(cause) => void send({ cause, confirmedAbove: cause === null })}
          onClose={() => setAsking(false)}
        />
      ) : null}
    </>
  );
}

function saveWords(complete: boolean, count: number, bags: number): string {
  if (!complete) return "A pile is not complete";
  const weights = `${count} ${count === 1 ? "weight" : "weights"}`;
  return `Save ${weights}, close ${bags === 1 ? "bag" : `${bags} bags`}`;
}

function keptWords({ state, keeping }: Session): string {
  if (!state.reached) return "Kept on this phone; the server does not answer.";
  if (keeping) return "Keeping it";
  return state.base.version > 0 ? "Kept, not saved yet" : "";
}
