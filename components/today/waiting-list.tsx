import type { Route } from "next";
import Link from "next/link";
import { Icon } from "@/components/ui/icon";
import type { WaitingLine } from "@/lib/reports/rules/desk-words";

/** What waits, one line each with the one place to go to. */
export function WaitingList({
  lines,
  done,
}: {
  lines: readonly WaitingLine[];
  done: readonly string[];
}) {
  return (
    <section aria-labelledby="waiting" className="mb-6 max-w-2xl">
      <h2 id="waiting" className="mb-2 font-heading text-xl font-bold">
        What waits
      </h2>
      {lines.length === 0 ? (
        <p className="text-soft">
          Nothing waits. Everything that came in is weighed, sorted and looked at.
        </p>
      ) : (
        <ul className="divide-y divide-rule rounded-ticket border border-rule bg-card">
          {lines.map(({ key, tone, sentence, href, action }) => (
            <li key={key}>
              <Link
                href={href as Route}
                className="flex min-h-14 items-center gap-3 px-4 py-2.5 no-underline hover:bg-well"
              >
                <span className="min-w-0 grow text-ink">
                  {tone === "warn" ? <span className="font-bold text-warn">Check: </span> : null}
                  {sentence}
                </span>
                <span className="shrink-0 font-bold text-act">{action}</span>
                <span className="text-act">
                  <Icon name="forward" size={20} />
                </span>
              </Link>
            </li>
          ))}
        </ul>
      )}
      {done.length > 0 ? <p className="mt-3 text-soft">Today so far: {done.join("; ")}.</p> : null}
    </section>
  );
}
