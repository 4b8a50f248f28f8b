import { Figure } from "@/components/ui/figure";
import type { OwnLoss } from "@/lib/stock/contract/steps";
import { LAST_STEPS, shareWords } from "@/lib/stock/rules/own-loss";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";

const noteOf = ({ count, spread }: OwnLoss): string => {
  if (count === 0) return "no step yet";
  const steps = count === 1 ? "1 step" : `last ${count} steps`;
  return spread === null ? steps : `± ${shareWords(Math.abs(spread))}, ${steps}`;
};

/** What the scheme itself loses in each step: mean, spread, and on how many it rests. */
export function OwnLosses({ losses }: { losses: readonly OwnLoss[] }) {
  return (
    <section aria-label="Our own loss in each step" className="mb-6">
      <h2 className="mb-2 text-lg">Our own loss</h2>
      <div className="flex flex-wrap gap-x-10 gap-y-4">
        {losses.map((loss) => (
          <Figure
            key={loss.kind}
            label={STEP_KIND_NAMES[loss.kind]}
            value={loss.mean === null ? "–" : shareWords(loss.mean)}
            note={noteOf(loss)}
          />
        ))}
      </div>
      <p className="mt-2 max-w-[70ch] text-sm text-soft">
        Share of what went in that did not come out: mean and standard deviation of the last{" "}
        {LAST_STEPS} steps at most. Plans count with it. Washing gains water, which drying loses
        again.
      </p>
    </section>
  );
}
