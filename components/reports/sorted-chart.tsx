import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { formatDay, formatMonth, monthOf } from "@/lib/core/time";
import type { Chart, ChartKey } from "@/lib/reports/queries/chart";

const FILLS = [
  "fill-flake-blue",
  "fill-flake-yellow",
  "fill-flake-green",
  "fill-flake-red",
  "fill-flake-violet",
  "fill-flake-sky",
] as const;
const WIDTH = 420;
const HEIGHT = 190;
/** Between two parts of a bar, so that they stay apart without their colours. */
const GAP = 2;

const nameOf = (key: ChartKey): string => (key === null ? "Others" : POLYMER_NAMES[key].name);

/** What sorting put into lots, as bars by week or month; the same figures as a table for whoever cannot see it. */
export function SortedChart({ chart }: { chart: Chart }) {
  const { bins, stacks, unit } = chart;
  const title = `Sorted, by ${unit} and polymer`;
  const totals = bins.map((_, bin) =>
    stacks.reduce((sum, stack) => sum + (stack.heights[bin] ?? 0), 0),
  );
  const most = Math.max(...totals, 1);
  const step = WIDTH / Math.max(bins.length, 1);
  const bar = Math.min(step * 0.78, 46);
  const binWords = (at: number): string => {
    const bin = bins[at];
    if (!bin) return "";
    // "1 Sep" or "Sep": a full name would run into its neighbour.
    const month = formatMonth(monthOf(bin.from)).slice(0, 3);
    return unit === "week" ? `${Number(bin.from.slice(8))} ${month}` : month;
  };
  // At most six words below the bars, the first always.
  const every = Math.max(1, Math.ceil(bins.length / 6));

  if (stacks.length === 0) {
    return (
      <section aria-label={title}>
        <h2 className="mb-2 text-sm font-bold text-soft">{title}</h2>
        <p className="rounded-ticket border-2 border-dashed border-rule px-4 py-8 text-center text-soft">
          Nothing was sorted on these days.
        </p>
      </section>
    );
  }
  return (
    <section aria-label={title}>
      <h2 className="mb-2 text-sm font-bold text-soft">{title}</h2>
      <svg viewBox={`0 -14 ${WIDTH} ${HEIGHT + 36}`} className="block w-full" aria-hidden>
        <text x="0" y="-3" className="fill-soft font-mono text-[11px]">
          {formatKg(most, most < 10_000 ? 2 : 0)} kg
        </text>
        <path d={`M0 .5H${WIDTH}`} className="stroke-rule" strokeDasharray="3 4" />
        {bins.map((bin, at) => {
          let y = HEIGHT;
          return (
            <g key={bin.from}>
              {stacks.map((stack, place) => {
                const height = ((stack.heights[at] ?? 0) / most) * HEIGHT;
                if (height <= 0) return null;
                y -= height;
                return (
                  <rect
                    key={nameOf(stack.key)}
                    x={at * step + (step - bar) / 2}
                    y={y}
                    width={bar}
                    height={Math.max(height - GAP, 0.8)}
                    rx="1.5"
                    className={FILLS[place % FILLS.length]}
                  />
                );
              })}
              {at % every === 0 ? (
                <text
                  x={at * step + step / 2}
                  y={HEIGHT + 16}
                  textAnchor="middle"
                  className="fill-soft text-[11px]"
                >
                  {binWords(at)}
                </text>
              ) : null}
            </g>
          );
        })}
        <path d={`M0 ${HEIGHT + 0.5}H${WIDTH}`} className="stroke-ink" />
      </svg>
      <ul className="mt-1 flex flex-wrap gap-x-4 gap-y-1 text-sm" aria-hidden>
        {stacks.map((stack, place) => (
          <li key={nameOf(stack.key)} className="flex items-center gap-1.5">
            <svg viewBox="0 0 10 10" className="size-2.5">
              <rect width="10" height="10" className={FILLS[place % FILLS.length]} />
            </svg>
            {nameOf(stack.key)}
          </li>
        ))}
      </ul>
      {/* The frame is hidden, not the table: a table does not shrink to the one pixel of sr-only. */}
      <div className="sr-only">
        <table>
          <caption>{title}, kg</caption>
          <thead>
            <tr>
              <th scope="col">{unit === "week" ? "Week from" : "Month"}</th>
              {stacks.map((stack) => (
                <th key={nameOf(stack.key)} scope="col">
                  {nameOf(stack.key)}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {bins.map((bin, at) => (
              <tr key={bin.from}>
                <th scope="row">
                  {unit === "week" ? formatDay(bin.from) : formatMonth(monthOf(bin.from))}
                </th>
                {stacks.map((stack) => (
                  <td key={nameOf(stack.key)}>{formatKg(stack.heights[at] ?? 0)}</td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}
