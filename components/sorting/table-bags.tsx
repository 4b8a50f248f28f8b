"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Ticket } from "@/components/ui/ticket";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { BagToSort } from "@/lib/sorting/contract/sortings";
import { MOST_BAGS } from "@/lib/sorting/terms";
import { AddBagDialog } from "./add-bag-dialog";
import type { RefusedBag } from "./session-state";

type Props = {
  codes: readonly string[];
  /** Those that are known so far. */
  known: readonly BagToSort[];
  refused: RefusedBag | null;
  /** null: the session is over. */
  onCodes: ((codes: readonly string[]) => void) | null;
};

/** The bags that were tipped onto the table. */
export function TableBags({ codes, known, refused, onCodes }: Props) {
  const [adding, setAdding] = useState(false);
  return (
    <section aria-label="Bags on the table">
      <div className="mb-1.5 flex items-center justify-between gap-3">
        <h2 className="font-body text-sm font-bold text-soft">
          {codes.length === 1 ? "1 bag on the table" : `${codes.length} bags on the table`}
        </h2>
        {onCodes ? (
          <Button
            variant="link"
            size="small"
            disabled={codes.length >= MOST_BAGS}
            onClick={() => setAdding(true)}
          >
            Add a bag
          </Button>
        ) : null}
      </div>
      {codes.length > 0 ? (
        <Ticket padding="none">
          <ul>
            {codes.map((code) => {
              const bag = known.find((one) => one.code === code);
              const wrong = refused?.code === code ? refused.sentence : null;
              return (
                <li
                  key={code}
                  className="flex items-center gap-3 border-b border-rule py-1.5 pr-1 pl-4 last:border-0"
                >
                  <span className="min-w-0 grow">
                    <span className="block font-mono font-bold tracking-tighter">
                      {formatCode(code)}
                    </span>
                    <span className="block text-sm break-words text-soft">
                      {bag ? (bag.pointName ?? "No drop-off point") : "Asking for it"}
                    </span>
                    {wrong ? (
                      <span className="block text-sm font-bold text-bad">{wrong}</span>
                    ) : null}
                  </span>
                  <span className="font-mono font-bold whitespace-nowrap">
                    {bag ? formatKg(bag.netGrams) : "–"}
                    <span className="sr-only"> kg</span>
                  </span>
                  {onCodes && (codes.length > 1 || wrong) ? (
                    <Button
                      variant="link"
                      size="small"
                      aria-label={`Take ${formatCode(code)} off the table`}
                      onClick={() => onCodes(codes.filter((other) => other !== code))}
                    >
                      Take off
                    </Button>
                  ) : (
                    <span className="w-2" />
                  )}
                </li>
              );
            })}
          </ul>
        </Ticket>
      ) : null}
      {adding && onCodes ? (
        <AddBagDialog
          codes={codes}
          onAdd={(code) => onCodes([...codes, code])}
          onClose={() => setAdding(false)}
        />
      ) : null}
    </section>
  );
}
