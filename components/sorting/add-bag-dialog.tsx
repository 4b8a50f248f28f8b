"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useCallback, useState } from "react";
import { ProblemError } from "@/components/forms/problem-document";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { CodeEntry } from "./code-entry";
import { bagQuery } from "./use-table";

type Props = {
  codes: readonly string[];
  onAdd: (code: string) => void;
  onClose: () => void;
};

/** Another bag onto the table; it stays open, because several are often tipped one after the other. */
export function AddBagDialog({ codes, onAdd, onClose }: Props) {
  const cache = useQueryClient();
  const [said, setSaid] = useState<{ tone: "ok" | "bad"; title: string; words: string } | null>(
    null,
  );

  const take = useCallback(
    async (code: LabelCode) => {
      const shown = formatCode(code);
      try {
        const bag = await cache.query({ ...bagQuery(code), staleTime: 0, retry: false });
        // A replaced tag opens the same bag; it is known by its first code.
        cache.setQueryData(bagQuery(bag.code).queryKey, bag);
        if (codes.includes(bag.code)) {
          setSaid({ tone: "ok", title: `${shown} is on the table already`, words: "" });
        } else if (bag.state !== "weighed") {
          const sorted = bag.state === "sorted" || bag.state === "closed";
          setSaid({
            tone: "bad",
            title: sorted ? "Sorted already" : "Not weighed in yet",
            words: `${shown} was not put on the table.`,
          });
        } else {
          onAdd(bag.code);
          setSaid({
            tone: "ok",
            title: `${shown} is on the table`,
            words: [bag.pointName, `${formatKg(bag.netGrams)} kg`].filter(Boolean).join(", "),
          });
        }
      } catch (error) {
        setSaid({
          tone: "bad",
          title: "Not put on the table",
          words:
            error instanceof ProblemError
              ? error.problem.detail
              : "The server did not answer, so its weight is not known. What lies on the table is kept; try again in a moment.",
        });
      }
    },
    [cache, codes, onAdd],
  );

  return (
    <Dialog
      open
      onClose={onClose}
      title="Add a bag"
      actions={
        <Button variant="quiet" onClick={onClose}>
          Done
        </Button>
      }
    >
      <CodeEntry
        onCode={useCallback((code: LabelCode) => void take(code), [take])}
        action="Add it"
      />
      <div className="mt-4 min-h-16">
        {said ? (
          <Notice tone={said.tone} title={said.title} live="status">
            {said.words}
          </Notice>
        ) : null}
      </div>
    </Dialog>
  );
}
