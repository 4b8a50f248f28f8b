"use client";

import { TONE_TEXT } from "@/components/ui/figure";
import { formatKg } from "@/lib/core/mass";
import { PATTERNS } from "../stock/patterns";
import type { DeskLists } from "../weighing/use-desk-lists";
import { netOf, type Draft } from "./draft";
import type { Judged } from "./judged";
import { SumBar, type Segment } from "./sum-bar";
import { sumWords } from "./sum-words";

type Props = {
  draft: Draft;
  lists: DeskLists;
  judged: Judged;
  /** How many bags were tipped. */
  bagCount: number;
};

/** The largest thing on the table: what is weighed of what the bags held. */
export function SumHead({ draft, lists, judged, bagCount }: Props) {
  const { netGrams, sumGrams, verdict, toleranceMilligrams } = judged;
  const segments: Segment[] = [
    ...draft.piles.map((pile) => {
      const colour = lists.colours.find(({ code }) => code === pile.colourCode);
      return {
        key: pile.id,
        grams: netOf(pile.reading, lists.containers) ?? 0,
        hex: colour?.hex ?? null,
        pattern: colour ? PATTERNS[colour.look] : ("plain" as const),
      };
    }),
    ...draft.rejects.map((reject) => ({
      key: reject.id,
      grams: netOf(reject.reading, lists.containers) ?? 0,
      hex: null,
      pattern: "reject" as const,
    })),
  ];
  const said = sumWords(
    verdict,
    { fractions: draft.piles.length + draft.rejects.length, bags: bagCount },
    toleranceMilligrams,
  );
  return (
    <section aria-label="Weighed so far">
      <p className="mb-3 flex flex-wrap items-baseline gap-x-3">
        <span className="font-mono text-4xl font-bold">{formatKg(sumGrams)}</span>
        <span className="font-mono text-lg font-bold">of {formatKg(netGrams)} kg</span>
      </p>
      <SumBar segments={segments} netGrams={netGrams} />
      <p aria-live="polite" className={`mt-2 ${TONE_TEXT[said.tone]}`}>
        {said.words}
      </p>
    </section>
  );
}
