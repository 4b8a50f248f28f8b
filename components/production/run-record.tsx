import { ButtonLink } from "@/components/ui/button-link";
import { Figure } from "@/components/ui/figure";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { RunPage } from "@/lib/production/queries/runs";
import { duration } from "@/lib/production/rules/working";
import { RUN_STATE_NAMES } from "@/lib/production/terms";
import { BlendPicture } from "./blend-picture";
import { BlendTable } from "./blend-table";
import { CallOffRun } from "./call-off-run";
import { HeatCautions } from "./heat-cautions";
import { ReserveDesk } from "./reserve-desk";
import { runTitle } from "./run-title";

type Props = { page: RunPage; mayPlan: boolean };

/** A run: its plan, its blend, what is promised to it. */
export function RunRecord({ page, mayPlan }: Props) {
  const { run, tool, machine, piece, reservations } = page;
  const planned = run.state === "planned";
  const makers = [tool?.name, machine?.name].filter(Boolean).join(", ");
  return (
    <>
      <PageHeader
        title={runTitle(run)}
        lead={`Run ${run.number}, ${RUN_STATE_NAMES[run.state].toLowerCase()}. ${POLYMER_NAMES[run.polymer].name}${makers ? `, ${makers}` : ""}.`}
        back={{ href: "/runs", label: "Runs" }}
        figures={
          <>
            <Figure label="Needs" value={formatKg(run.needGrams)} unit="kg" align="right" />
            <Figure
              label="Reserved"
              value={formatKg(run.reservedGrams - run.shortGrams)}
              unit="kg"
              align="right"
              tone={run.shortGrams > 0 ? "warn" : "ink"}
            />
            <Figure label="Takes" value={duration(page.plannedSeconds)} align="right" />
          </>
        }
        actions={
          planned ? (
            <>
              <ButtonLink href={`/runs/${run.number}/sheet`} variant="quiet">
                Run sheet
              </ButtonLink>
              {mayPlan && reservations.length === 0 ? (
                <ButtonLink href={`/runs/${run.number}/plan`} variant="quiet">
                  Change the plan
                </ButtonLink>
              ) : null}
            </>
          ) : null
        }
      />
      {run.shortGrams > 0 ? (
        <Notice tone="warn" title={`Short by ${formatKg(run.shortGrams)} kg`} className="mb-4">
          A count, a correction or somebody&apos;s need left less in the lots than was promised.
          Give the short lots back and reserve others, or change the blend.
        </Notice>
      ) : null}
      <div className="grid gap-x-9 gap-y-6 rail:grid-cols-[minmax(0,1fr)_minmax(0,21rem)]">
        <div className="min-w-0">
          <BlendPicture colours={run.colours} folded={run.folded} seed={run.seed} />
          <BlendTable run={run} reservations={reservations} />
          {planned ? <ReserveDesk page={page} mayPlan={mayPlan} /> : null}
        </div>
        <div className="min-w-0">
          <dl className="grid gap-2 rounded-ticket border border-rule bg-card px-4 py-3 text-sm">
            <Fact label="Label">
              <span className="font-mono">{formatCode(page.labelCode)}</span>
            </Fact>
            <Fact label="Planned">
              {formatDay(dayOf(instant(run.plannedAt), page.timeZone))} by {page.plannedByName}
            </Fact>
            {page.plannedShots === null ? null : <Fact label="Shots">{page.plannedShots}</Fact>}
          </dl>
          <HeatCautions piece={piece} polymer={run.polymer} machine={machine} />
          {planned && mayPlan ? <CallOffRun runId={run.id} number={run.number} /> : null}
        </div>
      </div>
    </>
  );
}

function Fact({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <div className="flex flex-wrap justify-between gap-x-4">
      <dt className="text-soft">{label}</dt>
      <dd className="min-w-0 font-bold wrap-anywhere">{children}</dd>
    </div>
  );
}
