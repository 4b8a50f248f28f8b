"use client";

import { useMemo, useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { SelectField } from "@/components/ui/select-field";
import { formatKg } from "@/lib/core/mass";
import { instant } from "@/lib/core/time";
import {
  correctWeighInEndpoint,
  type CorrectWeighInReceipt,
  type WeighInPage,
} from "@/lib/weighing/contract/corrections";
import { ReasonField, reasonProblem } from "../removals/reason-field";
import { AnswerFields } from "./answer-fields";
import { replacementOf, taresOf, valuesOfWeighIn } from "./corrected-values";
import { focusField } from "./focus-field";
import { formField, netSoFar, readForm, type Problems } from "./read-form";
import { ReadingsFields } from "./readings-fields";
import type { DeskLists } from "./use-desk-lists";
import { useTicketForm } from "./use-ticket-form";
import { WhenFields } from "./when-fields";
import { readWhen, whenText } from "./when-text";

type Props = {
  weighIn: WeighInPage;
  lists: DeskLists;
  timeZone: string;
  onDone: (receipt: CorrectWeighInReceipt) => void;
};

const WHEN_SENTENCE = "Choose the day and the time.";

/** Everything that was typed, to be changed; and why. */
export function CorrectForm({ weighIn, lists, timeZone, onDone }: Props) {
  const save = useCommand(correctWeighInEndpoint);
  const form = useTicketForm(() => valuesOfWeighIn(weighIn, lists.containers));
  const { values, problems } = form;
  const before = instant(weighIn.occurredAt);
  const [when, setWhen] = useState(() => whenText(before, timeZone));
  const [nothing, setNothing] = useState(false);
  const [reason, setReason] = useState("");
  const [asked, setAsked] = useState(false);
  const tares = useMemo(() => taresOf(lists.containers, weighIn), [lists.containers, weighIn]);
  const scale = lists.scales.find(({ id }) => id === values.scaleId);
  const netGrams = netSoFar(values.readings, tares);

  function show(found: Problems) {
    form.say(found);
    const first = Object.keys(found)[0];
    if (first) focusField(first);
  }

  async function send() {
    setAsked(true);
    save.reset();
    const read = readForm(values, scale, tares);
    const at = readWhen(when, timeZone, before);
    if (!nothing) {
      const found = read.ok ? {} : read.problems;
      if (!read.ok || at === null) {
        show(at === null ? { ...found, when: WHEN_SENTENCE } : found);
        return;
      }
    }
    if (reasonProblem(reason)) {
      focusField("reason");
      return;
    }
    const replacement = nothing || !read.ok || at === null ? null : replacementOf(values, read, at);
    const result = await save.send({ id: weighIn.id, reason, replacement });
    if (result.kind === "done") onDone(result.receipt);
    else if (result.kind === "refused") {
      const fields = (result.problem.errors ?? [])
        .filter(({ path }) => path[0] === "replacement")
        .map(({ path, detail }) => [formField(path.slice(1)), detail] as const);
      if (fields.length > 0) show(Object.fromEntries(fields));
    }
  }

  const said = problems.occurredAt ?? problems.when;
  return (
    <form
      id="weigh-in"
      noValidate
      className="flex grow flex-col"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <div className="grid gap-5">
        <CheckField
          label="It was never weighed in"
          hint="Takes it back, with nothing in its place."
          checked={nothing}
          onChange={(event) => {
            setNothing(event.target.checked);
            save.reset();
          }}
        />
        {nothing ? null : (
          <>
            <ReadingsFields form={form} scale={scale} tares={tares} asked={asked} />
            <div className="grid gap-3 wide:grid-cols-2">
              <SelectField
                label="Scale"
                name="scaleId"
                value={values.scaleId}
                onChange={(event) => {
                  form.set({ scaleId: event.target.value });
                  form.forgive("readings");
                }}
                placeholder="Choose the scale"
                options={lists.scales.map(({ id, name }) => ({ value: id, label: name }))}
                error={problems.scaleId}
              />
              <SelectField
                label="Drop-off point"
                name="pointId"
                value={values.pointId}
                onChange={(event) => form.set({ pointId: event.target.value })}
                error={problems.pointId}
              >
                {lists.points.some(({ id }) => id === weighIn.pointId) ? null : (
                  <option value={weighIn.pointId}>{weighIn.pointName}</option>
                )}
                {lists.points.map(({ id, name }) => (
                  <option key={id} value={id}>
                    {name}
                  </option>
                ))}
              </SelectField>
            </div>
            <WhenFields
              value={when}
              onValue={(next) => {
                setWhen(next);
                form.forgive("when", "occurredAt");
              }}
              error={said}
            />
            <AnswerFields
              weighIn={{ form, sameAsLast: null }}
              colours={lists.colours}
              photos={null}
              middle={null}
            />
          </>
        )}
        <ReasonField
          value={reason}
          onValue={setReason}
          asked={asked}
          error={save.fieldErrors.reason}
        />
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
            ? "Take the weigh-in back"
            : netGrams !== null && netGrams > 0
              ? `Correct to ${formatKg(netGrams)} kg`
              : "Correct it"}
        </Button>
      </ActionBar>
    </form>
  );
}
