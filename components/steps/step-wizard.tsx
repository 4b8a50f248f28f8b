"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import type { ProblemDocument } from "@/lib/core/errors";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Skeleton } from "@/components/ui/skeleton";
import { useCommand } from "@/components/forms/use-command";
import { formatKg } from "@/lib/core/mass";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { correctStepEndpoint, saveStepEndpoint } from "@/lib/stock/contract/steps";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";
import { LaterUses } from "../ledger/later-uses";
import type { LaterUses as Later } from "@/lib/core/schemas";
import { ReasonField } from "../stock/reason-field";
import { RefusalNotice } from "../stock/refusal-notice";
import { ReservedQuestion } from "../stock/reserved-question";
import { useBinDesk } from "../stock/use-bin-desk";
import {
  contentOf,
  EMPTY_STEP,
  inputGrams,
  newInput,
  newOutput,
  outputGrams,
  readStepDraft,
  sumsOf,
  writeStepDraft,
  type StepDraft,
} from "./step-draft";
import { StepStages, type Stage } from "./step-stages";
import { StepSum } from "./step-sum";

const SAVE = { method: "POST", path: "/api/steps" } as const;
const CORRECT = { method: "POST", path: "/api/steps/{id}/correct" } as const;

type Props = {
  /** Whose session this is: a draft belongs to one helper. */
  helperId: string;
  /** The lot that the page was opened from. */
  from: LotSummary | null;
  /** The step that is corrected, with what it said and when. */
  correcting?: { id: string; draft: StepDraft; occurredAt: number };
  timeZone: string;
};

type Corrected = { later: Later; id: string };

const STAGES: readonly Stage[] = ["in", "out", "rest"];
const TITLES: Record<Stage, string> = {
  in: "1 of 3: what goes in",
  out: "2 of 3: what came out",
  rest: "3 of 3: what was lost",
};

/** Where a refused field stands. */
function stageOf(problem: ProblemDocument): Stage {
  const [first] = problem.errors?.[0]?.path ?? [];
  if (first === "inputs" || first === "kind") return "in";
  return first === "outputs" ? "out" : "rest";
}

/** Washing, drying, shredding, on a phone with gloves: three stages, kept on this device until saved. */
export function StepWizard({ helperId, from, correcting, timeZone }: Props) {
  const router = useRouter();
  const { lists, scaleId } = useBinDesk();
  const save = useCommand<typeof saveStepEndpoint>(SAVE);
  const correct = useCommand<typeof correctStepEndpoint>(CORRECT);
  const command = correcting ? correct : save;
  const [stage, setStage] = useState<Stage>("in");
  const [asked, setAsked] = useState(false);
  const [reservedToo, setReservedToo] = useState(false);
  const [reason, setReason] = useState("");
  const [corrected, setCorrected] = useState<Corrected | null>(null);
  const [typed, setTyped] = useState<StepDraft | null>(correcting?.draft ?? null);

  // The draft is on this device only, so the first drawing of the page does not know it.
  useEffect(() => {
    if (typed !== null) return;
    const timer = setTimeout(() => {
      const kept = readStepDraft(helperId);
      const base = kept ?? EMPTY_STEP;
      const known = base.inputs.some(({ lot }) => lot.number === from?.number);
      setTyped(from && !known ? { ...EMPTY_STEP, inputs: [newInput(from)] } : base);
    }, 0);
    return () => clearTimeout(timer);
  }, [typed, helperId, from]);

  if (corrected) {
    return (
      <div className="grid gap-4 rail:max-w-3xl">
        <LaterUses later={corrected.later} title="Corrected" timeZone={timeZone} />
        <ButtonLink href={`/steps/${corrected.id}`}>Open the step</ButtonLink>
      </div>
    );
  }
  if (typed === null || !lists.ready) {
    return <Skeleton shape="tickets" count={2} label="Loading the step" />;
  }
  const draft: StepDraft = { ...typed, scaleId: typed.scaleId || scaleId };
  const change = (next: StepDraft) => {
    setTyped(next);
    if (!correcting) writeStepDraft(helperId, next);
  };
  const sums = sumsOf(draft, lists);
  const content = contentOf(draft, lists);
  const at = STAGES.indexOf(stage);

  function mayLeave(): boolean {
    if (stage === "in") {
      return (
        draft.kind !== "" &&
        draft.inputs.length > 0 &&
        draft.inputs.every((input) => (inputGrams(input, lists) ?? 0) > 0)
      );
    }
    return (
      draft.outputs.length > 0 && draft.outputs.every((one) => outputGrams(one, lists) !== null)
    );
  }

  function next() {
    setAsked(true);
    if (!mayLeave()) return;
    setAsked(false);
    const to = STAGES[at + 1] ?? stage;
    if (to === "out" && draft.outputs.length === 0) {
      change({ ...draft, outputs: [newOutput(undefined)] });
    }
    setStage(to);
    window.scrollTo(0, 0);
  }

  async function send(knowingly = reservedToo) {
    setAsked(true);
    const open = sums.verdict.kind === "needs-cause" || sums.verdict.kind === "needs-check";
    if (!content || open || (correcting && reason.trim().length < 3)) return;
    if (correcting) {
      const { occurredAt } = correcting;
      const result = await correct.send({
        id: correcting.id,
        reason,
        replacement: { ...content, occurredAt },
      });
      if (result.kind === "done") {
        const { later, replacementId, stepId } = result.receipt;
        // What was taken since is named once, here: the corrected lots do not show it as such.
        if (later.count > 0) setCorrected({ later, id: replacementId ?? stepId });
        else router.push(`/steps/${replacementId ?? stepId}`);
      } else if (result.kind === "refused") setStage(stageOf(result.problem));
      return;
    }
    const result = await save.send(
      { ...content, occurredAt: Date.now(), reservedToo: knowingly },
      { pressedAt: "occurredAt" },
    );
    if (result.kind === "done") {
      writeStepDraft(helperId, null);
      router.push(`/steps/${result.receipt.stepId}`);
    } else if (result.kind === "refused") setStage(stageOf(result.problem));
  }

  const name = draft.kind === "" ? "step" : STEP_KIND_NAMES[draft.kind].toLowerCase();
  return (
    <>
      <h2 className="mb-3 text-lg" aria-live="polite">
        {TITLES[stage]}
      </h2>
      {stage === "in" ? null : <StepSum sums={sums} />}
      <div className="grid gap-5 rail:max-w-3xl">
        <StepStages
          stage={stage}
          draft={draft}
          onDraft={change}
          lists={lists}
          asked={asked}
          errors={command.fieldErrors}
          mayState={correcting !== undefined}
        />
        {stage === "rest" && correcting ? (
          <ReasonField
            value={reason}
            onValue={setReason}
            error={command.fieldErrors.reason}
            asked={asked}
          />
        ) : null}
        <ReservedQuestion
          command={command}
          onTake={() => {
            setReservedToo(true);
            void send(true);
          }}
        />
        <RefusalNotice command={command} except={["lot-holds-less", "lot-reserved"]} />
      </div>
      <ActionBar>
        {at > 0 ? (
          <Button
            variant="quiet"
            onClick={() => {
              setAsked(false);
              setStage(STAGES[at - 1] ?? stage);
            }}
          >
            Back
          </Button>
        ) : null}
        {stage === "rest" ? (
          <Button className="grow" busy={command.pending} onClick={() => void send()}>
            {correcting ? "Correct" : "Save"} {name}, {formatKg(sums.outGrams)} kg
          </Button>
        ) : (
          <Button className="grow" onClick={next}>
            {stage === "in"
              ? sums.inGrams > 0
                ? `${formatKg(sums.inGrams)} kg go in, next`
                : "Next"
              : `${formatKg(sums.outGrams)} kg came out, next`}
          </Button>
        )}
      </ActionBar>
    </>
  );
}
