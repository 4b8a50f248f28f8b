"use client";

import { useRouter, useSearchParams } from "next/navigation";
import { useCallback, useState } from "react";
import { ActionBar } from "@/components/ui/action-bar";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { Figure } from "@/components/ui/figure";
import { Icon } from "@/components/ui/icon";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { Ticket } from "@/components/ui/ticket";
import { formatCode, type LabelCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import { formatKg } from "@/lib/core/mass";
import type { WaitingBag, WaitingFilter } from "@/lib/sorting/contract/waiting";
import { MOST_BAGS } from "@/lib/sorting/terms";
import { useDeskLists } from "../weighing/use-desk-lists";
import { useToday } from "../weighing/use-today";
import { CodeEntry } from "./code-entry";
import { PutAside } from "./put-aside";
import { useWaitingBags } from "./use-table";
import { isNarrowed, readFilter, waitingAddress } from "./waiting-address";
import { WaitingFilters } from "./waiting-filters";
import { WaitingRow } from "./waiting-row";

/** Bags that wait, oldest first; a tag scanned or typed puts one on the table, several ticked go together. */
export function WaitingBags() {
  const router = useRouter();
  const query = useSearchParams();
  const filter = readFilter(query);
  const after = query.get("after") ?? undefined;
  const { data, isError } = useWaitingBags(filter, after);
  const { points } = useDeskLists();
  const today = useToday(1);
  const [ticked, setTicked] = useState<ReadonlyMap<string, WaitingBag>>(new Map());
  const open = useCallback((code: LabelCode) => router.push(`/sorting/${code}`), [router]);
  const filtered = isNarrowed(filter);

  // The list comes from a handler, so the page need not be asked for again.
  const narrow = (next: WaitingFilter) =>
    window.history.replaceState(null, "", waitingAddress(next));
  const page = (next: string | undefined) =>
    window.history.pushState(null, "", waitingAddress(filter, next));

  function tick(bag: WaitingBag, on: boolean) {
    const next = new Map(ticked);
    if (on) next.set(bag.code, bag);
    else next.delete(bag.code);
    setTicked(next);
  }

  const chosen = [...ticked.values()];
  const alone = chosen.length > 1 ? chosen.find((bag) => bag.alone) : undefined;
  const grams = chosen.reduce((sum, { netGrams }) => sum + netGrams, 0);
  return (
    <>
      <PageHeader
        title="Sorting"
        titleInBar
        lead="Tip bags onto the table, split them into piles, weigh each."
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
      <CodeEntry onCode={open} action="Sort it" />
      {isError ? (
        <Notice tone="warn" title="The server did not answer" live="status" className="mt-4">
          The list may be old; the page goes on asking.
        </Notice>
      ) : null}
      {today.data ? (
        <PutAside
          helperId={today.data.helperId}
          timeZone={today.data.timeZone}
          now={today.data.now}
        />
      ) : null}
      <h2 className="mt-6 mb-1 text-lg">Waiting, oldest first</h2>
      <WaitingFilters filter={filter} points={points} onFilter={narrow} />
      {data ? (
        data.bags.length === 0 ? (
          <EmptyState title={filtered ? "No such bag waits" : "No bag waits"}>
            {filtered
              ? "Others may: show all of them."
              : "A bag that is weighed in as “Mixed, to sort” stands here until it is sorted."}
          </EmptyState>
        ) : (
          <Ticket padding="none">
            <ul aria-label="Bags that wait, oldest first">
              {data.bags.map((bag) => (
                <WaitingRow
                  key={bag.code}
                  bag={bag}
                  ticked={ticked.has(bag.code)}
                  onTick={(on) => tick(bag, on)}
                />
              ))}
            </ul>
          </Ticket>
        )
      ) : isError ? null : (
        <Skeleton shape="table" label="Loading the bags" />
      )}
      <div className="mt-4 flex gap-2.5">
        {after === undefined ? null : (
          <Button variant="quiet" size="small" onClick={() => page(undefined)}>
            From the oldest
          </Button>
        )}
        {data?.next ? (
          <Button variant="quiet" size="small" onClick={() => page(data.next ?? undefined)}>
            Newer bags
          </Button>
        ) : null}
      </div>
      {chosen.length > 0 ? (
        <>
          {alone ? (
            <Notice tone="warn" title="One is better sorted alone" live="status" className="mt-4">
              {formatCode(alone.code)} was picked at random, so that the reject rate of its drop-off
              point is known.
            </Notice>
          ) : null}
          <div className="h-4" />
          <ActionBar>
            <Button
              variant="quiet"
              aria-label="Tick none"
              onClick={() => setTicked(new Map())}
              className="w-14 shrink-0 px-0!"
            >
              <Icon name="close" />
            </Button>
            <Button
              className="grow"
              disabled={chosen.length > MOST_BAGS}
              onClick={() =>
                router.push(
                  `/sorting/table/${newId()}?bags=${chosen.map(({ code }) => code).join(".")}`,
                )
              }
            >
              {chosen.length > MOST_BAGS
                ? `${MOST_BAGS} bags at most`
                : chosen.length === 1
                  ? `Sort 1 bag, ${formatKg(grams)} kg`
                  : `Sort ${chosen.length} together, ${formatKg(grams)} kg`}
            </Button>
          </ActionBar>
        </>
      ) : null}
    </>
  );
}
