import { ButtonLink } from "@/components/ui/button-link";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatKg } from "@/lib/core/mass";
import { dayOf, daysBetween, formatDay, type Day } from "@/lib/core/time";
import type { RejectBin } from "@/lib/removals/queries/reject-bin";

type Props = { bin: RejectBin; today: Day; timeZone: string; mayRecord: boolean };

/** What stands in the reject bin, and since when. */
export function RejectBinTicket({ bin, today, timeZone, mayRecord }: Props) {
  return (
    <Ticket
      as="section"
      label="Reject bin"
      stub={
        <>
          <h2 className="mb-2 text-xl">Reject bin</h2>
          <WeightDisplay label="By the book" value={formatKg(bin.heldGrams)} largest={56} />
        </>
      }
    >
      <p className="mb-4">{bin.since === null ? "It is empty." : ageWords(bin.since)}</p>
      {mayRecord ? (
        <div className="flex flex-wrap gap-2.5 *:grow">
          <ButtonLink href="/removals/new">Take rejects away</ButtonLink>
          <ButtonLink
            href={{ pathname: "/removals/new", query: { from: "stock" } }}
            variant="quiet"
          >
            Take stock away
          </ButtonLink>
        </div>
      ) : (
        <p className="text-soft">A lead or coordinator records what is taken away.</p>
      )}
    </Ticket>
  );

  function ageWords(since: NonNullable<RejectBin["since"]>): string {
    const first = dayOf(since, timeZone);
    const days = daysBetween(first, today);
    if (days <= 0) return "The first of it came in today.";
    return `The first of it has been there for ${days} ${days === 1 ? "day" : "days"}, since ${formatDay(first)}.`;
  }
}
