import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { ORIGIN_NAMES } from "@/lib/reports/terms";
import type { LotView } from "@/lib/stock/queries/lots";

const HEATED = [
  "Never heated",
  "Heated once",
  "Heated twice",
  "Heated three times or more",
] as const;

function Shares({ title, shares }: { title: string; shares: { name: string; grams: number }[] }) {
  const total = shares.reduce((sum, share) => sum + share.grams, 0);
  return (
    <section aria-label={title}>
      <h3 className="mt-4 mb-1 text-sm font-bold text-soft first:mt-0">{title}</h3>
      <ul>
        {shares.map((share) => (
          <li key={share.name} className="border-b border-rule py-1.5 last:border-0">
            <span className="flex items-baseline justify-between gap-4">
              <span className="min-w-0">{share.name}</span>
              <span className="font-mono whitespace-nowrap">{formatKg(share.grams)}</span>
            </span>
            <span aria-hidden className="mt-1 block h-1.5 rounded-plate bg-well">
              <span
                style={{ width: `${((share.grams / total) * 100).toFixed(2)}%` }}
                className="block h-full min-w-0.5 rounded-plate bg-ink"
              />
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

/** Where the lot's content came from and how often it was heated: shares by weight, not a physical trace. */
export function LotComposition({
  lot,
}: {
  lot: Pick<LotView, "origins" | "heated" | "heldGrams">;
}) {
  return (
    <Ticket as="section" label="What is in it">
      <h2 className="mb-3 text-lg">What is in it</h2>
      {lot.heldGrams === 0 ? (
        <p className="text-soft">It is empty now. What went through it stands below.</p>
      ) : (
        <>
          <Shares
            title="Attributed by weight to"
            shares={lot.origins.map(({ pointName, type, grams }) => ({
              name: pointName ?? ORIGIN_NAMES[type],
              grams,
            }))}
          />
          <Shares
            title="Times heated"
            shares={lot.heated.map(({ times, grams }) => ({
              name: HEATED[Math.min(times, 3)] ?? HEATED[3],
              grams,
            }))}
          />
        </>
      )}
    </Ticket>
  );
}
