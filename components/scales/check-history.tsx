import Link from "next/link";
import type { ScaleCheckView } from "@/lib/scales/queries/checks";
import { ErrorChart } from "./error-chart";

type Props = {
  scaleId: string;
  /** Newest first. */
  checks: readonly ScaleCheckView[];
  /** Which weight's errors are drawn; the last one's without. */
  weightId: string | undefined;
};

/** The chart of one weight's errors over time; the table of checks has the same figures. */
export function CheckHistory({ scaleId, checks, weightId }: Props) {
  const drawn = checks.some((check) => check.checkWeightId === weightId)
    ? weightId
    : checks[0]?.checkWeightId;
  const weights = [
    ...new Map(checks.map((check) => [check.checkWeightId, check.weightName] as const)),
  ];
  if (checks.length === 0) {
    return <p className="text-soft">No check weight has been on this scale yet.</p>;
  }
  return (
    <section aria-label="Checks" className="grid gap-5">
      {weights.length > 1 ? (
        <nav aria-label="Check weight in the chart" className="flex flex-wrap gap-x-5">
          {weights.map(([id, name]) => (
            <Link
              key={id}
              href={{ pathname: `/scales/${scaleId}`, query: { weight: id } }}
              aria-current={id === drawn ? "true" : undefined}
              className="link inline-flex min-h-11 items-center aria-current:font-bold aria-current:text-ink"
            >
              {name}
            </Link>
          ))}
        </nav>
      ) : null}
      <ErrorChart checks={checks.filter((check) => check.checkWeightId === drawn).reverse()} />
    </section>
  );
}
