"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { DataTable } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { Figure } from "@/components/ui/figure";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, daysBetween, instant } from "@/lib/core/time";
import { CONDITION_NAMES } from "@/lib/weighing/terms";
import { CodeEntry } from "./code-entry";
import { useWaitingBags } from "./use-table";

function ageWords(weighedAt: number): string {
  // Ages in whole days by this device's calendar: a hint for the eye, never a figure.
  const zone = Intl.DateTimeFormat().resolvedOptions().timeZone;
  const days = daysBetween(dayOf(instant(weighedAt), zone), dayOf(instant(Date.now()), zone));
  if (days <= 0) return "today";
  return days === 1 ? "yesterday" : `${days} days ago`;
}

/** Bags that wait, oldest first; a tag scanned or typed puts one on the table. */
export function WaitingBags() {
  const [pages, setPages] = useState<(string | undefined)[]>([undefined]);
  const after = pages.at(-1);
  const { data, isError } = useWaitingBags(after);
  return (
    <>
      <PageHeader
        title="Sorting"
        titleInBar
        lead="Tip one bag onto the table, split it into piles, weigh each."
        figures={
          data ? (
            <Figure
              label={data.waiting.bags === 1 ? "1 bag waits" : `${data.waiting.bags} bags wait`}
              value={formatKg(data.waiting.grams, 2)}
              unit="kg"
              align="right"
            />
          ) : null
        }
      />
      <CodeEntry />
      {isError ? (
        <Notice tone="warn" title="The server did not answer" live="status" className="mb-4">
          The list may be old; the page goes on asking.
        </Notice>
      ) : null}
      <h2 className="mt-6 mb-2 text-lg">Oldest first</h2>
      {data ? (
        <DataTable
          caption="Bags that wait, oldest first"
          rows={data.bags}
          rowKey={(bag) => bag.code}
          empty={
            <EmptyState title="No bag waits">
              A bag that is weighed in as &ldquo;Mixed, to sort&rdquo; stands here until it is
              sorted.
            </EmptyState>
          }
          columns={[
            {
              key: "code",
              header: "Tag",
              head: true,
              cell: (bag) => (
                <Link
                  href={`/sorting/${bag.code}`}
                  className="link inline-flex min-h-11 items-center font-mono"
                >
                  {formatCode(bag.code)}
                </Link>
              ),
            },
            { key: "point", header: "Drop-off point", cell: (bag) => bag.pointName ?? "Not known" },
            { key: "age", header: "Weighed in", cell: (bag) => ageWords(bag.weighedAt) },
            {
              key: "condition",
              header: "Condition",
              cell: (bag) => (bag.condition ? CONDITION_NAMES[bag.condition] : "–"),
            },
            {
              key: "guess",
              header: "Guess",
              wideOnly: true,
              cell: (bag) =>
                bag.polymer && bag.polymer !== "mixed" ? POLYMER_NAMES[bag.polymer].name : "–",
            },
            { key: "kg", header: "kg", align: "figure", cell: (bag) => formatKg(bag.netGrams) },
          ]}
        />
      ) : isError ? null : (
        <Skeleton shape="table" label="Loading the bags" />
      )}
      <div className="mt-4 flex gap-2.5">
        {pages.length > 1 ? (
          <Button variant="quiet" size="small" onClick={() => setPages(pages.slice(0, -1))}>
            Older bags
          </Button>
        ) : null}
        {data?.next ? (
          <Button
            variant="quiet"
            size="small"
            onClick={() => setPages([...pages, data.next ?? undefined])}
          >
            Newer bags
          </Button>
        ) : null}
      </div>
    </>
  );
}
