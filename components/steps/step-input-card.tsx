"use client";

import { WeightField } from "@/components/forms/weight-field";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { BinWeighing } from "../stock/bin-weighing";
import { errorsUnder } from "../stock/field-errors";
import { LeftFields } from "../stock/left-fields";
import type { DeskLists } from "../weighing/use-desk-lists";
import { inputGrams, type InputDraft } from "./step-draft";

type Props = {
  input: InputDraft;
  onInput: (input: InputDraft) => void;
  onRemove: () => void;
  scaleId: string;
  lists: DeskLists;
  asked: boolean;
  /** Refusals of this input by field. */
  errors: Readonly<Record<string, string>>;
  /** In a correction grams may be given that no scale showed. */
  mayState: boolean;
};

/** One lot that goes in, and how much of it. */
export function StepInputCard({
  input,
  onInput,
  onRemove,
  scaleId,
  lists,
  asked,
  errors,
  mayState,
}: Props) {
  const { lot } = input;
  const grams = inputGrams(input, lists);
  const back = (reading: InputDraft["before"]) => ({ scaleId, readings: [reading] });
  return (
    <Ticket
      as="li"
      label={`Lot ${lot.number}`}
      stub={
        <div className="flex items-start justify-between gap-3">
          <div className="min-w-0">
            <p className="font-bold">
              Lot {lot.number}: {pileName(lot.colourName, lot.polymer)}
            </p>
            <p className="text-sm text-soft">
              {pileDetail(lot)}; the book holds {formatKg(lot.heldGrams)} kg
            </p>
            {errors.number ? <p className="text-sm font-bold text-bad">{errors.number}</p> : null}
          </div>
          <p className="font-mono text-lg font-bold whitespace-nowrap">
            {grams === null ? "–" : formatKg(grams)} kg
          </p>
        </div>
      }
    >
      <div className="grid gap-4">
        <ChoiceTiles
          legend={`How much of lot ${lot.number} goes in?`}
          name={`how-${lot.number}`}
          columns={3}
          value={input.how}
          onChoose={(how) => onInput({ ...input, how: how as InputDraft["how"] })}
          choices={[
            mayState
              ? { value: "stated", label: "Type the weight" }
              : { value: "all", label: "All of it", disabled: lot.heldGrams === 0 },
            { value: "taken", label: "Weigh what is taken" },
            { value: "weighed-back", label: "Bin before and after" },
          ]}
        />
        {input.how === "stated" ? (
          <WeightField
            label="Weight that went in"
            text={input.statedKg}
            onText={(statedKg) => onInput({ ...input, statedKg })}
            showProblem={asked}
            error={errors["amount.grams"]}
          />
        ) : null}
        {input.how === "taken" ? (
          <>
            <BinWeighing
              value={{ ...input.weighing, scaleId }}
              onValue={(weighing) => onInput({ ...input, weighing })}
              lists={lists}
              asked={asked}
              errors={errorsUnder(errors, "amount")}
              hideScale
              label="Taken"
            />
            <CheckField
              label="The bin is empty now"
              checked={input.emptied}
              onChange={(event) => onInput({ ...input, emptied: event.target.checked })}
            />
          </>
        ) : null}
        {input.how === "weighed-back" ? (
          <div className="grid gap-5 wide:grid-cols-2">
            {(["before", "after"] as const).map((when) => (
              <div key={when} className="grid gap-2">
                <h3 className="font-bold">{when === "before" ? "Before" : "After"}</h3>
                <BinWeighing
                  value={back(input[when])}
                  onValue={({ readings: [reading] }) =>
                    reading ? onInput({ ...input, [when]: reading }) : undefined
                  }
                  lists={lists}
                  asked={asked}
                  errors={{
                    "readings.0.grossMilligrams": errors[`amount.${when}.grossMilligrams`] ?? "",
                  }}
                  single
                  hideScale
                />
              </div>
            ))}
          </div>
        ) : null}
        {errors.count ? (
          <LeftFields
            value={{ ...input.left, weighing: { ...input.left.weighing, scaleId } }}
            onValue={(left) => onInput({ ...input, left })}
            lists={lists}
            asked={asked}
            errors={errorsUnder(errors, "count")}
            said={errors.count}
          />
        ) : null}
        <p>
          <Button variant="link" size="small" onClick={onRemove}>
            Take lot {lot.number} off
          </Button>
        </p>
      </div>
    </Ticket>
  );
}
