import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { formatDay } from "@/lib/core/time";
import type { Report } from "@/lib/reports/queries/report";
import { lastDayOf } from "@/lib/reports/rules/periods";

type Line = { words: string; grams: number; strong?: boolean };

const MINUS = "\u2212";

/** "+ 687.940", "− 58.220": the sign stands apart, so that the figures keep their column. */
function signed(grams: number): string {
  if (grams === 0) return formatKg(0);
  return `${grams < 0 ? MINUS : "+"}\u2009${formatKg(Math.abs(grams))}`;
}

function Row({ line }: { line: Line }) {
  return (
    <div
      className={`flex items-baseline justify-between gap-4 py-2 ${line.strong ? "border-b-2 border-ink font-bold" : "border-b border-rule"}`}
    >
      <dt className="min-w-0">{line.words}</dt>
      <dd className="font-mono whitespace-nowrap">
        {line.strong ? formatKg(line.grams) : signed(line.grams)}
      </dd>
    </div>
  );
}

/** What was in the shed, what came, what left, what is in the shed: it adds up to the gram. */
export function BalanceTicket({ report }: { report: Report }) {
  const { total, closing, period, today } = report;
  const inside: Line[] = [
    { words: "Collected", grams: total.collected },
    { words: "Other plastic in", grams: total.otherIn },
    { words: "Counted in on the first day", grams: total.openingCount },
    { words: "Rejects taken away", grams: -total.disposed },
    { words: "Loss", grams: -total.loss },
    { words: "Weighing and count difference", grams: -total.difference },
    { words: "Made into pieces", grams: -total.pieces },
    { words: "Passed on, without a receipt yet", grams: -total.passedUnproven },
    { words: "Passed on, with receipt", grams: -total.passedProven },
    { words: "From before the first day", grams: -total.beforeOpening },
  ];
  const rare = new Set([1, 2, 7, 9]);
  const shown = inside.filter((line, at) => !rare.has(at) || line.grams !== 0);
  const parts = [
    { words: "unsorted", grams: closing.unsorted },
    { words: "sorted", grams: closing.sorted },
    { words: "in work", grams: closing.inWork },
    { words: "reject bin", grams: closing.reject },
  ];
  const last = lastDayOf(period);
  if (!report.hasBalance) {
    return (
      <Ticket as="section" label="Collected">
        <dl>
          <Row line={{ words: "Collected", grams: total.collected }} />
          <Row line={{ words: "of it from before the first day", grams: total.beforeOpening }} />
        </dl>
        <p className="mt-4 text-soft">
          These days begin before the scheme&rsquo;s first day. What was collected then is known,
          what stood in the shed is not, so there is no balance.
        </p>
      </Ticket>
    );
  }
  return (
    <Ticket as="section" label="Mass balance in kg">
      <dl>
        <Row
          line={{
            words: `In the shed, ${formatDay(period.from)}`,
            grams: total.opening,
            strong: true,
          }}
        />
        {shown.map((line) => (
          <Row key={line.words} line={line} />
        ))}
        <Row
          line={{
            words: last >= today ? "In the shed now" : `In the shed, end of ${formatDay(last)}`,
            grams: total.closing,
            strong: true,
          }}
        />
      </dl>
      <dl className="mt-3 grid grid-cols-2 gap-x-6 gap-y-1 text-sm wide:grid-cols-4">
        {parts.map((part) => (
          <div key={part.words}>
            <dt className="text-soft">{part.words}</dt>
            <dd className="font-mono">{formatKg(part.grams)}</dd>
          </div>
        ))}
      </dl>
    </Ticket>
  );
}
