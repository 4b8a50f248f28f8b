import Link from "next/link";
import { ButtonLink } from "@/components/ui/button-link";
import { EmptyState } from "@/components/ui/empty-state";
import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import type { RunSummary } from "@/lib/production/contract/plans";
import { RUN_STATE_NAMES } from "@/lib/production/terms";
import { BlendPicture } from "./blend-picture";
import { runTitle } from "./run-title";

type Props = { runs: readonly RunSummary[]; mayPlan: boolean };

/** Runs, newest first, each with its blend. */
export function RunList({ runs, mayPlan }: Props) {
  if (runs.length === 0) {
    return (
      <EmptyState
        title="No run yet"
        action={mayPlan ? <ButtonLink href="/runs/new">Plan a run</ButtonLink> : undefined}
      >
        A run is one session at a machine: one kind of piece, of one plastic. Its plan says what it
        takes and whether the stock has it.
      </EmptyState>
    );
  }
  return (
    <ul className="grid gap-3 wide:grid-cols-2">
      {runs.map((run) => (
        <Ticket as="li" key={run.id} padding="none">
          <div className="overflow-hidden">
            <BlendPicture
              colours={run.colours}
              folded={run.folded}
              seed={run.seed}
              width={360}
              height={60}
              className="rounded-b-none"
            />
            <div className="flex flex-wrap items-start justify-between gap-x-4 gap-y-1 px-4 py-3">
              <div className="min-w-0">
                <Link
                  href={`/runs/${run.number}`}
                  className="link block py-1.5 font-heading text-lg/6 font-bold wrap-anywhere"
                >
                  {runTitle(run)}
                </Link>
                <p className="text-sm text-soft">
                  Run {run.number}, {POLYMER_NAMES[run.polymer].name},{" "}
                  {run.colours.map(({ name }) => name.toLowerCase()).join(" and ")}
                </p>
              </div>
              <div className="wide:text-right">
                <p className="font-mono text-lg font-bold tracking-tighter">
                  {formatKg(run.needGrams)} kg
                </p>
                <p
                  className={`text-sm font-bold ${run.shortGrams > 0 ? "text-warn" : "text-soft"}`}
                >
                  {standing(run)}
                </p>
              </div>
            </div>
          </div>
        </Ticket>
      ))}
    </ul>
  );
}

function standing({ state, reservedGrams, shortGrams, needGrams }: RunSummary): string {
  if (state !== "planned") return RUN_STATE_NAMES[state];
  if (shortGrams > 0) return `Short by ${formatKg(shortGrams)} kg`;
  if (reservedGrams >= needGrams) return "All reserved";
  return reservedGrams > 0 ? `${formatKg(reservedGrams)} kg reserved` : "Nothing reserved";
}
