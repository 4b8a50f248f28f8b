import { Notice } from "@/components/ui/notice";
import type { Plan, PlanParts } from "@/lib/production/rules/plan";
import { unfitWords } from "@/lib/production/rules/plan-words";
import { workingOf } from "@/lib/production/rules/working";

type Props = { pieces: number; plan: Plan; parts: PlanParts };

/** The sum behind the need, line by line, so that it can be done again by hand. */
export function Working({ pieces, plan, parts }: Props) {
  if (plan.kind === "lacks") {
    return (
      <Notice tone="info" title="Not worked out" live="status" className="mt-4">
        Choose a {plan.what} to see what it takes; the catalogue has them.
      </Notice>
    );
  }
  return (
    <>
      <section
        aria-label="Working"
        className="mt-4 rounded-ticket border border-rule bg-card px-4 py-3"
      >
        <h2 className="font-body text-sm font-bold text-soft">Working</h2>
        <ul className="mt-1 grid gap-0.5 font-mono text-sm/6 tracking-tight">
          {workingOf(pieces, plan.need, parts).map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
        <p className="mt-2 text-xs text-soft">Density: {parts.density.source}.</p>
      </section>
      {plan.kind === "unfit" ? (
        <Notice tone="bad" title="It does not fit" live="status" className="mt-3">
          {unfitWords(plan.unfit)}
        </Notice>
      ) : null}
    </>
  );
}
