import Link from "next/link";
import { QueryProvider } from "@/components/forms/query-provider";
import { ButtonLink } from "@/components/ui/button-link";
import { Figure } from "@/components/ui/figure";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, formatClock, formatDay, instant } from "@/lib/core/time";
import { LOSS_CAUSE_NAMES } from "@/lib/ledger/terms";
import type { StepView } from "@/lib/stock/contract/steps";
import { shareWords } from "@/lib/stock/rules/own-loss";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";
import { PATTERNS } from "../stock/patterns";
import { UndoRecord } from "../stock/undo-record";
import { RecordPhotos } from "../uploads/record-photos";
import { TakeBackStep } from "./take-back-step";

type Props = {
  step: StepView;
  timeZone: string;
  mayCorrect: boolean;
  helperId: string;
  mayRemovePhotos: boolean;
};
type Row = StepView["inputs"][number] | StepView["outputs"][number];

function Rows({ title, rows }: { title: string; rows: readonly Row[] }) {
  return (
    <Ticket as="section" label={title} padding="none">
      <h2 className="px-4 pt-4 text-lg wide:px-5">{title}</h2>
      <ul>
        {rows.map((row, at) => (
          <li
            key={at}
            className="flex items-center gap-3 border-b border-rule px-4 py-3 last:border-0 wide:px-5"
          >
            <PileSwatch hex={row.colourHex} pattern={PATTERNS[row.colourLook]} seed={row.number} />
            <span className="min-w-0 grow">
              <Link
                href={`/stock/lots/${row.number}`}
                className="link inline-flex min-h-11 items-center font-bold"
              >
                Lot {row.number}
              </Link>
              <span className="block text-sm text-soft">
                {pileName(row.colourName, row.polymer)}, {pileDetail(row)}
                {row.scaleName === null ? "" : `; ${row.scaleName}`}
                {"taking" in row && row.taking === "weighed-back" ? ", bin before and after" : ""}
              </span>
            </span>
            <span className="font-mono text-lg font-bold">{formatKg(row.grams)}</span>
          </li>
        ))}
      </ul>
    </Ticket>
  );
}

/** One step with what went in, what came out and what was lost. */
export function StepPage({ step, timeZone, mayCorrect, helperId, mayRemovePhotos }: Props) {
  const day = (at: number) => formatDay(dayOf(instant(at), timeZone));
  const rest = step.inputGrams - step.outputGrams - step.lossGrams;
  return (
    <>
      <PageHeader
        title={`${STEP_KIND_NAMES[step.kind]} ${POLYMER_NAMES[step.polymer].name}`}
        lead={`${day(step.occurredAt)}, ${formatClock(instant(step.occurredAt), timeZone)}, by ${step.byName}${step.minutes === null ? "" : `, ${step.minutes} minutes`}`}
        back={{ href: "/steps", label: "Steps" }}
        figures={
          <>
            <Figure label="In" value={formatKg(step.inputGrams)} unit="kg" align="right" />
            <Figure label="Out" value={formatKg(step.outputGrams)} unit="kg" align="right" />
          </>
        }
      />
      {step.state === "posted" ? null : (
        <Notice
          tone="warn"
          className="mb-4"
          title={step.state === "undone" ? "This step was undone." : "This step was corrected."}
          action={
            step.correction?.replacementId ? (
              <Link
                href={`/steps/${step.correction.replacementId}`}
                className="link inline-flex min-h-11 items-center font-bold"
              >
                What stands in its place
              </Link>
            ) : null
          }
        >
          {step.correction
            ? `${step.correction.byName}, ${day(step.correction.at)}: ${step.correction.reason ?? "the reason was erased"}`
            : null}
        </Notice>
      )}
      {step.corrects === null ? null : (
        <p className="mb-4">
          <Link
            href={`/steps/${step.corrects}`}
            className="link inline-flex min-h-11 items-center font-bold"
          >
            It stands in the place of another
          </Link>
        </p>
      )}
      <div className="grid items-start gap-4 rail:grid-cols-2">
        <Rows title="Went in" rows={step.inputs} />
        <Rows title="Came out" rows={step.outputs} />
      </div>
      <dl className="mt-5 grid max-w-md grid-cols-[minmax(0,1fr)_auto] gap-x-6 gap-y-1.5">
        {step.losses.map(({ cause, grams }) => (
          <div key={cause} className="contents">
            <dt>{LOSS_CAUSE_NAMES[cause]}, lost</dt>
            <dd className="text-right font-mono font-bold">{formatKg(grams)} kg</dd>
          </div>
        ))}
        {rest === 0 ? null : (
          <div className="contents">
            <dt>{rest > 0 ? "Weighing difference, missing" : "Difference, more than went in"}</dt>
            <dd className="text-right font-mono font-bold">{formatKg(Math.abs(rest))} kg</dd>
          </div>
        )}
        <div className="contents">
          <dt className="text-soft">Did not come out</dt>
          <dd className="text-right font-mono">
            {shareWords((step.inputGrams - step.outputGrams) / step.inputGrams)}
          </dd>
        </div>
      </dl>
      <div className="mt-6 max-w-xl">
        <QueryProvider>
          <RecordPhotos
            kind="step"
            id={step.stepId}
            label="Photos of this step"
            facts={{
              what: `${STEP_KIND_NAMES[step.kind]} ${POLYMER_NAMES[step.polymer].name}`,
              grams: step.outputGrams,
              day: dayOf(instant(step.occurredAt), timeZone),
              timeZone,
            }}
            helperId={helperId}
            mayRemove={mayRemovePhotos}
          />
        </QueryProvider>
      </div>
      <div className="mt-6 flex flex-wrap items-center gap-2.5 max-wide:*:grow">
        {mayCorrect ? <ButtonLink href="/steps/new">Next step</ButtonLink> : null}
        {step.undoUntil === null ? null : (
          <UndoRecord
            path="/api/steps/{id}/undo"
            id={step.stepId}
            until={step.undoUntil}
            what="this step"
          />
        )}
        {mayCorrect && step.state === "posted" ? (
          <>
            <ButtonLink variant="quiet" href={`/steps/${step.stepId}/correct`}>
              Correct
            </ButtonLink>
            <TakeBackStep id={step.stepId} timeZone={timeZone} />
          </>
        ) : null}
      </div>
    </>
  );
}
