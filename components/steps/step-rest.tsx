"use client";

import { WeightField } from "@/components/forms/weight-field";
import { CheckField } from "@/components/ui/check-field";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { TextField } from "@/components/ui/text-field";
import { LOSS_CAUSE_NAMES, type LossCause } from "@/lib/ledger/terms";
import { STEP_CAUSES } from "@/lib/stock/rules/steps";
import type { StepKind } from "@/lib/stock/terms";
import type { StepDraft, StepSumsSoFar } from "./step-draft";

type Props = {
  kind: StepKind;
  draft: StepDraft;
  onDraft: (draft: StepDraft) => void;
  sums: StepSumsSoFar;
  asked: boolean;
  errors: Readonly<Record<string, string>>;
};

/** What was lost and how long it took; and, where book and scale disagree, the one question. */
export function StepRest({ kind, draft, onDraft, sums, asked, errors }: Props) {
  const causes = STEP_CAUSES[kind];
  const kgOf = (cause: LossCause) => draft.losses.find((loss) => loss.cause === cause)?.kg ?? "";
  const lose = (cause: LossCause, kg: string) => {
    const others = draft.losses.filter((loss) => loss.cause !== cause);
    onDraft({ ...draft, losses: kg.trim() === "" ? others : [...others, { cause, kg }] });
  };
  const { verdict } = sums;
  const missing = verdict.kind === "needs-cause" || verdict.kind === "loss";
  const more = verdict.kind === "needs-check" || (draft.confirmed && verdict.kind === "gain");
  return (
    <div className="grid gap-5">
      {missing ? (
        <ChoiceTiles
          legend="Where did the rest go?"
          name="cause"
          columns={2}
          value={draft.cause}
          onChoose={(cause) => onDraft({ ...draft, cause: cause as LossCause })}
          choices={causes.map((cause) => ({ value: cause, label: LOSS_CAUSE_NAMES[cause] }))}
          hint="Or go back and weigh again."
          error={
            errors.cause ??
            (asked && draft.cause === "" ? "Say where it went, or weigh again." : undefined)
          }
        />
      ) : null}
      {more ? (
        <CheckField
          label="Weighed again, and it stays so"
          hint="The difference is written down under its own name."
          checked={draft.confirmed}
          onChange={(event) => onDraft({ ...draft, confirmed: event.target.checked })}
          error={
            asked && !draft.confirmed ? (errors.confirmed ?? "Weigh both again first.") : undefined
          }
        />
      ) : null}
      <fieldset className="grid gap-3 wide:grid-cols-2">
        <legend className="mb-1.5 text-sm font-bold text-soft">
          Lost and weighed; leave empty what was not weighed
        </legend>
        {causes.map((cause) => (
          <WeightField
            key={cause}
            label={LOSS_CAUSE_NAMES[cause]}
            text={kgOf(cause)}
            onText={(kg) => lose(cause, kg)}
            optional
          />
        ))}
      </fieldset>
      <TextField
        label="How long did it take?"
        inputMode="numeric"
        unit="min"
        value={draft.minutes}
        onChange={(event) => onDraft({ ...draft, minutes: event.target.value })}
        error={
          errors.minutes ??
          (draft.minutes.trim() !== "" && !/^\d{1,5}$/.test(draft.minutes.trim())
            ? "Whole minutes, such as 45."
            : undefined)
        }
      />
    </div>
  );
}
