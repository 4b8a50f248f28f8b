"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { Notice } from "@/components/ui/notice";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { formatKg } from "@/lib/core/mass";
import type { LotSummary } from "@/lib/stock/contract/lots";
import type { MoveReceipt } from "@/lib/stock/contract/moves";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { IdentifyDialog } from "./identify-dialog";
import { PATTERNS } from "./patterns";
import { UndoRecord } from "./undo-record";

type Props = { lots: readonly LotSummary[]; mayIdentify: boolean };

/** The lots that nobody was sure of, each with its way out. */
export function NotSureLots({ lots, mayIdentify }: Props) {
  const router = useRouter();
  const [opened, setOpened] = useState<LotSummary | null>(null);
  const [receipt, setReceipt] = useState<MoveReceipt | null>(null);
  return (
    <QueryProvider>
      {receipt ? (
        <Notice
          tone="ok"
          live="status"
          className="mb-4"
          title={`${formatKg(receipt.grams)} kg went to lot ${receipt.to.number}${receipt.to.opened ? ", a new lot" : ""}.`}
          action={
            <UndoRecord
              path="/api/lot-moves/{id}/undo"
              id={receipt.moveId}
              until={receipt.undoUntil}
              what="the identification"
              onUndone={() => setReceipt(null)}
            />
          }
        />
      ) : null}
      {lots.length === 0 ? (
        <EmptyState title="Everything here is known">
          A pile that nobody is sure of stands here until somebody finds out what it is.
        </EmptyState>
      ) : (
        <ul className="grid gap-2.5">
          {lots.map((lot) => (
            <li
              key={lot.number}
              className="flex flex-wrap items-center gap-3 rounded-ticket border border-rule bg-card px-4 py-3"
            >
              <PileSwatch
                hex={lot.colourHex}
                pattern={PATTERNS[lot.colourLook]}
                seed={lot.number}
              />
              <span className="min-w-0 grow basis-40">
                <Link
                  href={`/stock/lots/${lot.number}`}
                  className="link inline-flex min-h-11 items-center font-bold"
                >
                  Lot {lot.number}
                </Link>
                <span className="block text-sm text-soft">
                  {pileName(lot.colourName, lot.polymer)}, {pileDetail(lot)}
                  {lot.place ? `, ${lot.place}` : ""}
                </span>
              </span>
              <span className="font-mono text-lg font-bold">{formatKg(lot.heldGrams)} kg</span>
              {mayIdentify ? (
                <Button variant="quiet" onClick={() => setOpened(lot)} className="max-wide:w-full">
                  Identify
                </Button>
              ) : null}
            </li>
          ))}
        </ul>
      )}
      {opened ? (
        <IdentifyDialog
          lot={opened}
          onSaved={(saved) => {
            setOpened(null);
            setReceipt(saved);
            router.refresh();
          }}
          onClose={() => setOpened(null)}
        />
      ) : null}
    </QueryProvider>
  );
}
