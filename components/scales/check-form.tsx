"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { useCommand } from "@/components/forms/use-command";
import { WeightField } from "@/components/forms/weight-field";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { formatMilligrams, formatStep, readMass } from "@/lib/core/mass";
import {
  checkScaleEndpoint,
  type CheckReceipt,
  type CheckWeight,
  type ScaleToday,
} from "@/lib/scales/contract/checks";
import { CONFIRMED_STATES, type ScaleDayState } from "@/lib/scales/terms";

type Props = {
  scaleId: string;
  state: ScaleDayState;
  weights: readonly CheckWeight[];
  /** Other scales as they stand today. */
  others: readonly ScaleToday[];
};

/** Puts a check weight on the scale: what it is, what the scale shows, and what that means. */
export function CheckForm({ scaleId, state, weights, others }: Props) {
  const router = useRouter();
  const save = useCommand(checkScaleEndpoint);
  const [weightId, setWeightId] = useState(weights[0]?.id ?? "");
  const [text, setText] = useState("");
  const [asked, setAsked] = useState(false);
  const [result, setResult] = useState<CheckReceipt | null>(null);
  // Known from the answer before the page is made anew.
  const over = state === "failed" || result?.state === "failed";

  async function send() {
    const reading = readMass(text, "kg");
    setAsked(true);
    if (!reading.ok || weightId === "") return;
    const answer = await save.send({
      scaleId,
      checkWeightId: weightId,
      readingMilligrams: reading.milligrams,
    });
    if (answer.kind !== "done") return;
    setResult(answer.receipt);
    setText("");
    setAsked(false);
    router.refresh();
  }

  return (
    <div className="grid gap-4">
      {result ? <Result result={result} /> : null}
      {over ? <Failed others={others} /> : null}
      {weights.length === 0 ? (
        <Notice tone="info" title="No check weight yet">
          A coordinator adds one under Scales: any object that was weighed on a verified scale, such
          as a dumbbell or a full bottle that stays closed.
        </Notice>
      ) : over ? null : (
        <form
          noValidate
          className="grid gap-4"
          onSubmit={(event) => {
            event.preventDefault();
            void send();
          }}
        >
          <CommandNotice command={save} shownFields={["readingMilligrams", "checkWeightId"]} />
          <SelectField
            label="Check weight"
            hint="Zero the empty scale, then put it in the middle."
            value={weightId}
            onChange={(event) => setWeightId(event.target.value)}
            options={weights.map(({ id, name, massMilligrams }) => ({
              value: id,
              label: `${name}, ${formatMilligrams(massMilligrams)} kg`,
            }))}
            error={save.fieldErrors.checkWeightId}
          />
          <WeightField
            label="The scale shows"
            text={text}
            onText={setText}
            showProblem={asked}
            error={save.fieldErrors.readingMilligrams}
          />
          <Button type="submit" busy={save.pending}>
            {state === "failed-once" || result?.state === "failed-once"
              ? "Save the repeated check"
              : "Save the check"}
          </Button>
        </form>
      )}
    </div>
  );
}

/** "5 g too much" */
function errorWords(errorMilligrams: number): string {
  if (errorMilligrams === 0) return "Exactly right";
  const size = formatStep(Math.abs(errorMilligrams));
  return `${size} too ${errorMilligrams > 0 ? "much" : "little"}`;
}

function Result({ result }: { result: CheckReceipt }) {
  const allowed = `Up to ${formatStep(result.limitMilligrams)} either way is good.`;
  if (result.passed) {
    return (
      <Notice tone="ok" title="The scale is right" live="status">
        {errorWords(result.errorMilligrams)}. {allowed}
      </Notice>
    );
  }
  return (
    <Notice tone="bad" title={errorWords(result.errorMilligrams)} live="alert">
      {allowed}{" "}
      {result.state === "failed-once"
        ? "Look whether it stands level and free, zero it, and check it once more."
        : "That was the second time."}
    </Notice>
  );
}

function Failed({ others }: { others: readonly ScaleToday[] }) {
  const good = others.filter(({ state }) => CONFIRMED_STATES.includes(state));
  return (
    <Notice tone="warn" title="Not confirmed today">
      {good.length > 0
        ? `Use ${good.map(({ name }) => name).join(" or ")}, which was checked today. `
        : "No other scale was checked today. "}
      Weighing on this one goes on: its readings are marked, and a lead looks at them.
    </Notice>
  );
}
