"use client";

import { useState } from "react";
import { useRouter } from "next/navigation";
import { EmptyState } from "@/components/ui/empty-state";
import { Notice } from "@/components/ui/notice";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { ForReview } from "@/lib/weighing/contract/corrections";
import { LaterUsesList } from "../ledger/later-uses-list";
import { DecideDialog, type Decided, type Deciding } from "./decide-dialog";
import { SecondReading } from "./second-reading";

type Props = { readings: readonly ForReview[]; timeZone: string };

/** Bags that were weighed twice: which reading counts. */
export function SecondReadings({ readings, timeZone }: Props) {
  const router = useRouter();
  const [deciding, setDeciding] = useState<Deciding | null>(null);
  const [said, setSaid] = useState<Decided | null>(null);
  return (
    <div className="grid gap-3 rail:max-w-3xl">
      {said ? (
        <Notice
          tone="ok"
          live="status"
          title={said.kind === "accepted" ? "The second counts now" : "Set aside; the first counts"}
        >
          Bag {formatCode(said.code)}
          {said.kind === "accepted" && said.netGrams !== null
            ? ` now counts ${formatKg(said.netGrams)} kg.`
            : " is as it was."}
          {said.kind === "accepted" && said.later.count > 0 ? (
            <>
              <br />
              It had been used before, and that stays as it is:
              <LaterUsesList later={said.later} timeZone={timeZone} />
            </>
          ) : null}
        </Notice>
      ) : null}
      {readings.length === 0 ? (
        <EmptyState title="Nothing to decide">
          When a bag that was weighed already is weighed again, the second reading stands here.
        </EmptyState>
      ) : (
        <ul className="grid gap-3">
          {readings.map((reading) => (
            <SecondReading
              key={reading.id}
              reading={reading}
              timeZone={timeZone}
              onDecide={(which) => setDeciding({ which, reading })}
            />
          ))}
        </ul>
      )}
      {deciding ? (
        <DecideDialog
          deciding={deciding}
          onClose={() => setDeciding(null)}
          onDecided={(decided) => {
            setDeciding(null);
            setSaid(decided);
            router.refresh();
          }}
        />
      ) : null}
    </div>
  );
}
