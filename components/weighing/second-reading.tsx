import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { instant } from "@/lib/core/time";
import type { ForReview } from "@/lib/weighing/contract/corrections";
import { whenWords } from "@/lib/weighing/rules";

type Props = {
  reading: ForReview;
  timeZone: string;
  onDecide: (which: "accept" | "discard") => void;
};

function One({
  label,
  id,
  netGrams,
  when,
  byName,
}: {
  label: string;
  id: string;
  netGrams: number;
  when: string;
  byName: string;
}) {
  return (
    <div className="min-w-0">
      <WeightDisplay label={label} value={formatKg(netGrams)} largest={36} />
      <p className="mt-1 text-sm text-soft">
        {when}, {byName}
      </p>
      <Link
        href={`/weigh-ins/${id}`}
        className="link inline-flex min-h-11 items-center text-sm font-bold"
      >
        See the ticket
      </Link>
    </div>
  );
}

/** "0.240 kg more" */
function apartWords(first: number, second: number): string {
  const apart = second - first;
  if (apart === 0) return "Both say the same.";
  return `The second is ${formatKg(Math.abs(apart))} kg ${apart > 0 ? "more" : "less"}.`;
}

/** The reading that counts and the second one, side by side. */
export function SecondReading({ reading, timeZone, onDecide }: Props) {
  const { code, pointName, first } = reading;
  const when = (at: number) => whenWords(instant(at), timeZone);
  return (
    <Ticket
      as="li"
      stub={
        <p className="flex flex-wrap items-baseline justify-between gap-x-4">
          <Link
            href={`/bags/${code}`}
            className="link inline-flex min-h-11 items-center font-mono text-lg font-bold tracking-tighter"
          >
            {formatCode(code)}
          </Link>
          <span className="break-words text-soft">{pointName}</span>
        </p>
      }
    >
      <div className="grid grid-cols-2 gap-4">
        {first ? (
          <One
            label="First, counts"
            id={first.id}
            netGrams={first.netGrams}
            when={when(first.occurredAt)}
            byName={first.byName}
          />
        ) : (
          <p className="text-soft">The first was taken back since. Nothing counts now.</p>
        )}
        <One
          label="Second"
          id={reading.id}
          netGrams={reading.netGrams}
          when={when(reading.occurredAt)}
          byName={reading.byName}
        />
      </div>
      {first ? (
        <p className="mt-1 font-bold">{apartWords(first.netGrams, reading.netGrams)}</p>
      ) : null}
      <div className="mt-3 grid grid-cols-2 gap-2.5">
        <Button variant="quiet" onClick={() => onDecide("discard")}>
          Set second aside
        </Button>
        <Button variant="quiet" onClick={() => onDecide("accept")}>
          Count the second
        </Button>
      </div>
    </Ticket>
  );
}
