"use client";

import { useCallback } from "react";
import { Button } from "@/components/ui/button";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { SelectField } from "@/components/ui/select-field";
import type { LotSummary } from "@/lib/stock/contract/lots";
import { STEP_KIND_NAMES, STEP_KINDS, MOST_STEP_OUTPUTS, type StepKind } from "@/lib/stock/terms";
import { errorsUnder } from "../stock/field-errors";
import { LotPicker } from "../stock/lot-picker";
import { rememberScale } from "../weighing/remembered-scale";
import type { DeskLists } from "../weighing/use-desk-lists";
import { StepCautions } from "./step-cautions";
import { newInput, newOutput, sumsOf, type StepDraft } from "./step-draft";
import { StepInputCard } from "./step-input-card";
import { StepOutputCard } from "./step-output-card";
import { StepRest } from "./step-rest";

export type Stage = "in" | "out" | "rest";

type Props = {
  stage: Stage;
  draft: StepDraft;
  onDraft: (draft: StepDraft) => void;
  lists: DeskLists;
  asked: boolean;
  errors: Readonly<Record<string, string>>;
  mayState: boolean;
};

const KIND_TILES = STEP_KINDS.map((value) => ({ value, label: STEP_KIND_NAMES[value] }));

/** One thing at a time: what goes in, what came out, what was lost. */
export function StepStages({ stage, draft, onDraft, lists, asked, errors, mayState }: Props) {
  const { inputs, outputs, scaleId, kind } = draft;
  const pick = useCallback(
    (lot: LotSummary) => {
      if (inputs.some((input) => input.lot.number === lot.number)) return;
      onDraft({
        ...draft,
        inputs: [...inputs, mayState ? { ...newInput(lot), how: "stated" } : newInput(lot)],
      });
    },
    [draft, inputs, onDraft, mayState],
  );
  const polymer = inputs[0]?.lot.polymer ?? null;
  const scaleField = (
    <SelectField
      label="Scale"
      value={scaleId}
      placeholder={scaleId === "" ? "Choose the scale" : undefined}
      onChange={(event) => {
        rememberScale(event.target.value);
        onDraft({ ...draft, scaleId: event.target.value });
      }}
      options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
      error={asked && scaleId === "" ? "Choose the scale." : errors.scaleId}
    />
  );
  if (stage === "in") {
    return (
      <div className="grid gap-5">
        <ChoiceTiles
          legend="Which step?"
          name="step"
          columns={3}
          choices={KIND_TILES}
          value={kind}
          onChoose={(value) => onDraft({ ...draft, kind: value as StepKind })}
          error={asked && kind === "" ? "Choose the step." : undefined}
        />
        {kind === "" ? null : <StepCautions kind={kind} polymer={polymer} />}
        <ul className="grid gap-3">
          {inputs.map((input, at) => (
            <StepInputCard
              key={input.lot.number}
              input={input}
              onInput={(next) =>
                onDraft({ ...draft, inputs: inputs.map((one, i) => (i === at ? next : one)) })
              }
              onRemove={() => onDraft({ ...draft, inputs: inputs.filter((_, i) => i !== at) })}
              scaleId={scaleId}
              lists={lists}
              asked={asked}
              errors={errorsUnder(errors, `inputs.${at}`)}
              mayState={mayState}
            />
          ))}
        </ul>
        {errors.inputs ? <p className="font-bold text-bad">{errors.inputs}</p> : null}
        <LotPicker
          like={polymer === null ? {} : { polymer }}
          without={inputs.map(({ lot }) => lot.number)}
          onPick={pick}
          legend={inputs.length === 0 ? "Which lot goes in?" : "Another lot of the same polymer"}
        />
        {inputs.some(({ how }) => how === "taken" || how === "weighed-back") ? scaleField : null}
      </div>
    );
  }
  if (stage === "out") {
    const kinds = [...new Set(inputs.map(({ lot }) => lot.kind))];
    const colours = [
      ...new Map(
        inputs.map(({ lot }) => [lot.colourCode, { code: lot.colourCode, name: lot.colourName }]),
      ).values(),
    ];
    return (
      <div className="grid gap-5">
        <ul className="grid gap-3">
          {outputs.map((output, at) => (
            <StepOutputCard
              key={output.id}
              output={output}
              at={at}
              onOutput={(next) =>
                onDraft({ ...draft, outputs: outputs.map((one, i) => (i === at ? next : one)) })
              }
              onRemove={
                outputs.length > 1
                  ? () => onDraft({ ...draft, outputs: outputs.filter((_, i) => i !== at) })
                  : null
              }
              scaleId={scaleId}
              lists={lists}
              asked={asked}
              errors={errorsUnder(errors, `outputs.${at}`)}
              kinds={kinds}
              colours={colours}
            />
          ))}
        </ul>
        {outputs.length < MOST_STEP_OUTPUTS ? (
          <Button
            variant="quiet"
            onClick={() => onDraft({ ...draft, outputs: [...outputs, newOutput(outputs.at(-1))] })}
          >
            Another reading
          </Button>
        ) : null}
        {scaleField}
      </div>
    );
  }
  return kind === "" ? null : (
    <StepRest
      kind={kind}
      draft={draft}
      onDraft={onDraft}
      sums={sumsOf(draft, lists)}
      asked={asked}
      errors={errors}
    />
  );
}
