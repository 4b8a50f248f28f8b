"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { useCommand } from "@/components/forms/use-command";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { SelectField } from "@/components/ui/select-field";
import { formatCode } from "@/lib/core/bag-code";
import { instant } from "@/lib/core/time";
import type { LossCause } from "@/lib/ledger/terms";
import type { BagToSort, closeSortingEndpoint, RejectReason } from "@/lib/sorting/contract/sortings";
import { judgeSum, loadsOf, toleranceOf } from "@/lib/sorting/rules/table";
import { CLOSE_SORTING_ADDRESS } from "@/lib/sorting/terms";
import { netGramsOf } from "@/lib/scales/rules/reading";
import { rememberedScale, rememberScale } from "../weighing/remembered-scale";
import type { DeskLists } from "../weighing/use-desk-lists";
import {
  bodyOf,
  EMPTY_DRAFT,
  newPile,
  newReject,
  readDraft,
  readingsOf,
  writeDraft,
  type Draft,
} from "./draft";
import { FractionDialogs, type Opened } from "./fraction-dialogs";
import { FractionList } from "./fraction-list";
import { LeftoverDialog } from "./leftover-dialog";
import { SumHead } from "./sum-head";

type Props = { bag: BagToSort; lists: DeskLists; reasons: readonly RejectReason[] };

/** A bag is tipped out: piles and rejects are weighed until they add up to what it held. */
export function SortingTable({ bag, lists, reasons }: Props) {
  const cache = useQueryClient();
  const save = useCommand<typeof closeSortingEndpoint>(CLOSE_SORTING_ADDRESS);
  const [draft, setDraft] = useState(() => readDraft(bag.helperId, bag.code));
  const [chosenScale, setChosenScale] = useState(() => rememberedScale());
  const [opened, setOpened] = useState<Opened | null>(null);
  const [asking, setAsking] = useState(false);

  const scale =
    lists.scales.find(({ id }) => id === chosenScale) ??
    lists.scales.find(({ id }) => id === bag.scaleId) ??
    lists.scales[0];
  const count = draft.piles.length + draft.rejects.length;
  const readings = readingsOf(draft, lists.containers);
  // Each pile is rounded to grams by itself, as the ledger takes it.
  const sumGrams = readings.reduce((sum, reading) => sum + netGramsOf([reading]), 0);
  const tolerance = toleranceOf([
    ...bag.readings,
    ...(scale ? readings.flatMap((reading) => loadsOf(reading, scale)) : []),
  ]);
  const verdict = judgeSum(bag.netGrams, sumGrams, tolerance, {
    cause: null,
    confirmedAbove: false,
  });
  const body = bodyOf(draft, lists.containers);

  function change(next: Draft) {
    setDraft(next);
    writeDraft(bag.helperId, bag.code, next);
    save.reset();
  }

  async function send(answer: { cause: LossCause | null; confirmedAbove: boolean }) {
    if (!body || !scale) return;
    const result = await save.send({
      codes: [bag.code],
      scaleId: scale.id,
      occurredAt: instant(Date.now()),
      ...body,
      ...answer,
    });
    setAsking(false);
    if (result.kind !== "done") return;
    writeDraft(bag.helperId, bag.code, EMPTY_DRAFT);
    // The page now shows the bag as it was sorted; the lists of bags and lots have changed too.
    await cache.invalidateQueries();
  }

  function close() {
    if (verdict.kind === "within") void send({ cause: null, confirmedAbove: false });
    else setAsking(true);
  }

  return (
    <>
      <PageHeader
        title={`Sorting ${formatCode(bag.code)}`}
        lead={bag.pointName ?? undefined}
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      <div className="grid gap-4 rail:max-w-3xl">
        <SumHead
          draft={draft}
          lists={lists}
          netGrams={bag.netGrams}
          sumGrams={sumGrams}
          verdict={verdict}
          tolerance={tolerance}
        />
        {count > 0 ? (
          <FractionList
            draft={draft}
            lists={lists}
            reasons={reasons}
            errors={save.fieldErrors}
            onOpen={setOpened}
          />
        ) : null}
        <div className="grid grid-cols-2 gap-2.5">
          <Button
            variant={count === 0 ? "act" : "quiet"}
            onClick={() =>
              setOpened({ kind: "pile", value: newPile(draft.piles.at(-1)), isNew: true })
            }
          >
            Add pile
          </Button>
          <Button
            variant="danger"
            onClick={() =>
              setOpened({
                kind: "reject",
                value: newReject((draft.rejects.at(-1) ?? draft.piles.at(-1))?.reading),
                isNew: true,
              })
            }
          >
            Add reject
          </Button>
        </div>
        <SelectField
          label="Scale"
          value={scale?.id ?? ""}
          onChange={(event) => {
            setChosenScale(event.target.value);
            rememberScale(event.target.value);
          }}
          options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
        />
        {save.unreachable ? (
          <Notice tone="warn" title="The server did not answer" live="alert">
            {UNREACHABLE_SENTENCE}
          </Notice>
        ) : save.problem ? (
          <Notice tone="bad" title="Nothing was saved" live="alert">
            {Object.values(save.fieldErrors)[0] ?? save.problem.detail}
          </Notice>
        ) : null}
      </div>
      {count > 0 ? (
        <ActionBar>
          <Button className="grow" onClick={close} busy={save.pending} disabled={!body || !scale}>
            {body
              ? `Save ${count} ${count === 1 ? "weight" : "weights"}, close bag`
              : "A pile is not complete"}
          </Button>
        </ActionBar>
      ) : null}
      {opened ? (
        <FractionDialogs
          key={opened.value.id}
          opened={opened}
          draft={draft}
          lists={lists}
          scale={scale}
          reasons={reasons}
          onDraft={(next) => {
            change(next);
            setOpened(null);
          }}
          onClose={() => setOpened(null)}
        />
      ) : null}
      {asking ? (
        <LeftoverDialog
          differenceGrams={verdict.differenceGrams}
          toleranceMilligrams={tolerance}
          busy={save.pending}
          onSave={(cause) => void send({ cause, confirmedAbove: cause === null })}
          onClose={() => setAsking(false)}
        />
      ) : null}
    </>
  );
}
