import Link from "next/link";
import type { ReactNode } from "react";
import { formatKg } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import type { CorrectionView, RemovalView } from "@/lib/removals/queries/removal-page";

type Props = { removal: RemovalView; when: (at: Instant) => string };

type Happened = { key: string; at: Instant; words: ReactNode };

const why = ({ reason, byName }: CorrectionView): string =>
  `Corrected by ${byName}: ${reason ?? "the reason was erased"}`;

function listHappened(removal: RemovalView): Happened[] {
  const happened: Happened[] = [
    {
      key: "recorded",
      at: removal.recordedAt,
      words: (
        <>
          Recorded by {removal.byName}, {formatKg(removal.grams)} kg.
          {removal.corrects === null ? null : (
            <>
              {" "}
              It stands in the place of <Other id={removal.corrects}>another one</Other>.
            </>
          )}
        </>
      ),
    },
  ];
  for (const receipt of removal.receipts) {
    happened.push({
      key: receipt.id,
      at: receipt.recordedAt,
      words: `Receipt ${receipt.number}, ${formatKg(receipt.receivedGrams)} kg received, entered by ${receipt.byName}${receipt.state === "undone" ? "; undone since" : ""}.`,
    });
    if (receipt.correction) {
      happened.push({
        key: `${receipt.id}:corrected`,
        at: receipt.correction.at,
        words: `Receipt ${receipt.number}: ${why(receipt.correction)}.`,
      });
    }
  }
  if (removal.correction) {
    const { replacementId, at } = removal.correction;
    happened.push({
      key: "corrected",
      at,
      words: (
        <>
          {why(removal.correction)}.{" "}
          {replacementId === null ? (
            "Nothing stands in its place."
          ) : (
            <Other id={replacementId}>See what stands in its place</Other>
          )}
        </>
      ),
    });
  }
  return happened.sort((a, b) => a.at - b.at);
}

function Other({ id, children }: { id: string; children: ReactNode }) {
  return (
    <Link href={`/removals/${id}`} className="link inline-flex min-h-11 items-center">
      {children}
    </Link>
  );
}

/** Everything that happened to a removal, oldest first. */
export function RemovalHistory({ removal, when }: Props) {
  return (
    <section aria-label="What happened" className="mt-8 max-w-3xl">
      <h2 className="mb-2 text-xl">What happened</h2>
      <ol className="grid gap-2">
        {listHappened(removal).map(({ key, at, words }) => (
          <li key={key} className="wrap-anywhere">
            <span className="font-mono text-sm text-soft">{when(at)}</span>
            <span className="block">{words}</span>
          </li>
        ))}
      </ol>
      {removal.state === "undone" ? (
        <p className="mt-2 font-bold">It was undone by whoever saved it.</p>
      ) : null}
    </section>
  );
}
