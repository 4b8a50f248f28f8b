import { ButtonLink } from "@/components/ui/button-link";
import { EmptyState } from "@/components/ui/empty-state";
import { Ticket } from "@/components/ui/ticket";
import type { ScaleToday } from "@/lib/scales/contract/checks";
import { CONFIRMED_STATES, SCALE_DAY_WORDS } from "@/lib/scales/terms";

/** How each scale stands today, with the way to check it. */
export function ScalesToday({ scales }: { scales: readonly ScaleToday[] }) {
  if (scales.length === 0) {
    return <EmptyState title="No scale yet">A coordinator adds the first one.</EmptyState>;
  }
  return (
    <ul aria-label="Scales today" className="mb-9 grid gap-3 wide:grid-cols-2">
      {scales.map(({ scaleId, name, state }) => {
        const confirmed = CONFIRMED_STATES.includes(state);
        return (
          <Ticket key={scaleId} as="li">
            <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-3">
              <div className="min-w-0">
                <p className="font-heading text-xl font-bold wrap-anywhere">{name}</p>
                <p className={`font-bold ${confirmed ? "text-ok" : "text-warn"}`}>
                  {SCALE_DAY_WORDS[state]}
                </p>
              </div>
              <ButtonLink href={`/scales/${scaleId}`} variant="quiet" size="small">
                {confirmed || state === "failed" ? "Open" : "Check"}
                <span className="sr-only"> {name}</span>
              </ButtonLink>
            </div>
          </Ticket>
        );
      })}
    </ul>
  );
}
