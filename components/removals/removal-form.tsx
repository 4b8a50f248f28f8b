"use client";

import type { ReactNode } from "react";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { Ticket } from "@/components/ui/ticket";
import { Button } from "@/components/ui/button";
import { formatKg } from "@/lib/core/mass";
import type { Day } from "@/lib/core/time";
import type { Destination } from "@/lib/removals/contract/destinations";
import type { Taking } from "@/lib/removals/contract/removals";
import type { ContainerReceipt } from "@/lib/scales/contract/containers";
import type { ScaleReceipt } from "@/lib/scales/contract/scales";
import { DestinationField } from "./destination-field";
import { LoadFields } from "./load-fields";
import { LocalRules } from "./local-rules";
import { LotsToTake } from "./lots-to-take";
import { newLoad, type DraftProblems, type LoadDraft, type RemovalDraft } from "./removal-draft";

export type RemovalLists = {
  destinations: readonly Destination[];
  scales: readonly ScaleReceipt[];
  tares: readonly ContainerReceipt[];
  today: Day;
  /** What the book has in the reject bin; for a correction as if the wrong one had not been. */
  binGrams: number;
};

type Props = {
  draft: RemovalDraft;
  lists: RemovalLists;
  problems: DraftProblems;
  onDraft: (draft: RemovalDraft) => void;
  /** Under the scale's field. */
  scaleNote: ReactNode;
};

const HOWS: readonly { value: Taking["how"]; label: string }[] = [
  { value: "weighed", label: "On a scale" },
  { value: "stated", label: "The carrier says" },
  { value: "book", label: "All, by the book" },
];

/** What was taken, how much, where it went, when, and the paper that went with it. */
export function RemovalForm({ draft, lists, problems, onDraft, scaleNote }: Props) {
  const set = (change: Partial<RemovalDraft>) => onDraft({ ...draft, ...change });
  const setLoad = (at: number, load: LoadDraft) =>
    set({ loads: draft.loads.map((one, index) => (index === at ? load : one)) });
  const scale = lists.scales.find(({ id }) => id === draft.scaleId);
  const fromBin = draft.loads[0]?.lot === null;
  return (
    <div className="grid gap-5">
      <ChoiceTiles
        legend="From"
        name="from"
        columns={2}
        value={fromBin ? "bin" : "stock"}
        onChoose={(from) => {
          if ((from === "bin") !== fromBin) set({ loads: from === "bin" ? [newLoad(null)] : [] });
        }}
        choices={[
          { value: "bin", label: "Reject bin" },
          { value: "stock", label: "Stock" },
        ]}
      />
      <ChoiceTiles
        legend="How its weight is known"
        name="how"
        columns={3}
        value={draft.how}
        onChoose={(how) => set({ how: how as Taking["how"] })}
        choices={HOWS}
      />
      {draft.how === "weighed" ? (
        <div>
          <SelectField
            label="Scale"
            name="scaleId"
            placeholder="Choose the scale"
            value={draft.scaleId}
            onChange={(event) => set({ scaleId: event.target.value })}
            options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
            error={problems["scaleId"]}
          />
          {scaleNote}
        </div>
      ) : null}
      {draft.loads.map((load, at) => (
        <Ticket
          key={load.lot?.number ?? "bin"}
          as="section"
          label={load.lot ? `Lot ${load.lot.number}` : "Reject bin"}
        >
          <div className="mb-3 flex items-start justify-between gap-3">
            <div className="min-w-0">
              <h2 className="text-lg">{load.lot ? `Lot ${load.lot.number}` : "Reject bin"}</h2>
              {load.lot ? (
                <p className="text-sm text-soft">
                  {load.lot.name}, {load.lot.detail}; {formatKg(load.lot.heldGrams)} kg by the book
                </p>
              ) : null}
            </div>
            {load.lot ? (
              <Button
                variant="link"
                size="small"
                aria-label={`Leave lot ${load.lot.number} out`}
                onClick={() => set({ loads: draft.loads.filter((one) => one !== load) })}
              >
                Leave out
              </Button>
            ) : null}
          </div>
          <LoadFields
            how={draft.how}
            load={load}
            name={`loads.${at}`}
            where={load.lot ? `lot ${load.lot.number}` : "the reject bin"}
            bookGrams={load.lot ? load.lot.heldGrams : lists.binGrams}
            scale={scale}
            tares={lists.tares}
            problems={problems}
            onLoad={(changed) => setLoad(at, changed)}
          />
        </Ticket>
      ))}
      {fromBin ? null : (
        <LotsToTake
          chosen={draft.loads.flatMap(({ lot }) => (lot ? [lot.number] : []))}
          onLot={(lot) => set({ loads: [...draft.loads, newLoad(lot)] })}
          error={problems["loads"]}
        />
      )}
      <DestinationField
        destinations={lists.destinations}
        value={draft.destinationId}
        today={lists.today}
        error={problems["destinationId"]}
        onChange={(destinationId) => set({ destinationId })}
      />
      <div className="grid gap-4 wide:grid-cols-2">
        <TextField
          type="date"
          label="Day"
          name="day"
          max={lists.today}
          value={draft.day}
          onChange={(event) => set({ day: event.target.value })}
          error={problems["day"]}
        />
        <TextField
          label="Note or ticket number"
          name="noteNumber"
          maxLength={60}
          autoComplete="off"
          value={draft.noteNumber}
          onChange={(event) => set({ noteNumber: event.target.value })}
          error={problems["noteNumber"]}
        />
      </div>
      <LocalRules />
    </div>
  );
}
