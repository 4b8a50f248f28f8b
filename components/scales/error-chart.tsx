import { individualsChart } from "@/lib/core/individuals-chart";
import { formatMilligrams, formatStep } from "@/lib/core/mass";
import { formatDay } from "@/lib/core/time";
import type { ScaleCheckView } from "@/lib/scales/queries/checks";

const WIDTH = 640;
const HEIGHT = 220;
/** With fewer checks a usual range would say more about chance than about the scale. */
const LEAST_FOR_RANGE = 5;

type Props = {
  /** Of one check weight, oldest first; at least one. */
  checks: readonly ScaleCheckView[];
};

const errorOf = (check: ScaleCheckView) => check.readingMilligrams - check.massMilligrams;

/** "+5 g", "−10 g", "0 g" */
function signed(milligrams: number): string {
  const sign = milligrams > 0 ? "+" : milligrams < 0 ? "\u2212" : "";
  return `${sign}${formatStep(Math.abs(milligrams))}`;
}

/**
 * The error of a scale over time: within what its class allows in service, and within its own usual range (individuals
 * chart). The table beside it has the same figures.
 */
export function ErrorChart({ checks }: Props) {
  const errors = checks.map(errorOf);
  const usual = checks.length < LEAST_FOR_RANGE ? null : individualsChart(errors);
  const last = checks.at(-1);
  const first = checks[0];
  if (!first || !last) return null;
  const most = Math.max(
    ...errors.map(Math.abs),
    ...checks.map((check) => check.limitMilligrams),
    usual ? Math.abs(usual.lower) : 0,
    usual ? Math.abs(usual.upper) : 0,
  );
  const step = WIDTH / checks.length;
  const x = (at: number) => step * (at + 0.5);
  const y = (milligrams: number) => HEIGHT / 2 - (milligrams / (most * 1.1)) * (HEIGHT / 2);
  const limit = (sign: 1 | -1) =>
    checks
      .map(({ limitMilligrams }, at) => {
        const level = y(sign * limitMilligrams).toFixed(1);
        return `${at === 0 ? "M" : "L"}${(step * at).toFixed(1)} ${level}H${(step * (at + 1)).toFixed(1)}`;
      })
      .join("");
  const unusual = usual !== null && isOutside(errors.at(-1) ?? 0, usual);
  return (
    <figure>
      <svg viewBox={`0 -4 ${WIDTH} ${HEIGHT + 8}`} className="block w-full" aria-hidden>
        <path d={`M0 ${y(0)}H${WIDTH}`} className="stroke-ink" />
        <path d={limit(1)} className="fill-none stroke-bad stroke-2" />
        <path d={limit(-1)} className="fill-none stroke-bad stroke-2" />
        {usual
          ? [usual.lower, usual.upper].map((level) => (
              <path
                key={level}
                d={`M0 ${y(level).toFixed(1)}H${WIDTH}`}
                className="stroke-act stroke-2"
                strokeDasharray="7 6"
              />
            ))
          : null}
        <path
          d={`M${errors.map((error, at) => `${x(at).toFixed(1)} ${y(error).toFixed(1)}`).join("L")}`}
          className="fill-none stroke-soft"
        />
        {checks.map((check, at) =>
          check.passed ? (
            <circle
              key={check.id}
              cx={x(at)}
              cy={y(errors[at] ?? 0)}
              r={Math.min(5, step * 0.4)}
              className="fill-ink"
            />
          ) : (
            // A failed one differs in shape too, not in colour alone.
            <path
              key={check.id}
              d={`M${x(at) - 6} ${y(errors[at] ?? 0) - 6}l12 12m0 -12l-12 12`}
              className="fill-none stroke-bad stroke-3"
            />
          ),
        )}
      </svg>
      {/* Words beside the drawing, not in it: they would shrink with it on a phone. */}
      <p className="flex justify-between gap-4 text-xs text-soft">
        <span>{formatDay(first.day)}</span>
        {checks.length > 1 ? <span>{formatDay(last.day)}</span> : null}
      </p>
      <figcaption className="mt-2 grid gap-1 text-sm">
        <span className="flex items-center gap-2">
          <Key className="stroke-bad" />
          Limit in service at {formatMilligrams(last.massMilligrams)} kg: ±{" "}
          {formatStep(last.limitMilligrams)}
        </span>
        {usual ? (
          <span className="flex items-center gap-2">
            <Key className="stroke-act" dashed />
            Usual range: {signed(Math.round(usual.lower))} to {signed(Math.round(usual.upper))},
            mean {signed(Math.round(usual.mean))}
          </span>
        ) : (
          <span className="text-soft">
            The usual range is drawn from {LEAST_FOR_RANGE} checks of one weight on.
          </span>
        )}
        {unusual ? (
          <strong className="text-warn">
            The last check is outside the usual range. Look at the scale before it fails.
          </strong>
        ) : null}
      </figcaption>
    </figure>
  );
}

const isOutside = (error: number, usual: { lower: number; upper: number }): boolean =>
  error < usual.lower || error > usual.upper;

function Key({ className, dashed = false }: { className: string; dashed?: boolean }) {
  return (
    <svg viewBox="0 0 28 4" className="h-1 w-7 shrink-0" aria-hidden>
      <path
        d="M0 2H28"
        className={`stroke-2 ${className}`}
        strokeDasharray={dashed ? "7 6" : undefined}
      />
    </svg>
  );
}
