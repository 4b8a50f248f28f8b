import Link from "next/link";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay } from "@/lib/core/time";
import type { LaterUses } from "@/lib/core/schemas";

/** What an entry did, seen from what it took from. */
const TAKEN: Partial<Record<string, string>> = {
  sort: "Sorted",
  step: "Went into a step",
  identify: "Identified",
  move: "Moved to another lot",
  count: "Counted, and less was there",
  draw: "Taken out for a run",
  cut: "Cut",
  removal: "Taken away",
  receipt: "Receipt",
};

type Props = { later: LaterUses; timeZone: string };

/** Where the record behind an entry is shown; null for those without a page of their own. */
function recordAddress(subject: string) {
  const [kind = "", id = ""] = subject.split(":", 2);
  if (kind === "sorting") return `/sorting/sessions/${id}` as const;
  if (kind === "step") return `/steps/${id}` as const;
  if (kind === "removal") return `/removals/${id}` as const;
  return kind === "weigh-in" ? (`/weigh-ins/${id}` as const) : null;
}

/** What was taken later from what a record had filled, by name: those records stay as they are. */
export function LaterUsesList({ later: { uses, count }, timeZone }: Props) {
  return (
    <ul className="mt-1 grid gap-1">
      {uses.map((use) => {
        const address = recordAddress(use.subject);
        const words = TAKEN[use.kind] ?? "Taken";
        return (
          <li key={use.entryId}>
            {address ? (
              <Link href={address} className="link inline-flex min-h-11 items-center font-bold">
                {words}
              </Link>
            ) : (
              <strong>{words}</strong>
            )}
            , <span className="font-mono">{formatKg(use.grams)}</span> kg,{" "}
            {formatDay(dayOf(use.occurredAt, timeZone))}, entry {use.entryId}
          </li>
        );
      })}
      {count > uses.length ? <li>and {count - uses.length} more</li> : null}
    </ul>
  );
}
