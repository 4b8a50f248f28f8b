"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import Link from "next/link";
import { useState } from "react";
import { EmptyState } from "@/components/ui/empty-state";
import { Figure } from "@/components/ui/figure";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { formatKg } from "@/lib/core/mass";
import type { StockFilter } from "@/lib/stock/contract/stock";
import { layOutShelf } from "@/lib/stock/rules/shelf";
import { filterQuery, filterValues } from "./filter-query";
import { ShelfGrid } from "./shelf-grid";
import { ShelfSections } from "./shelf-sections";
import { StockFilters } from "./stock-filters";
import { StockLinks } from "./stock-links";
import { stockQuery } from "./stock-query";

/** The stock by polymer and colour, fresh by itself. The page's server has put the first answer into the cache. */
export function StockView({ first }: { first: StockFilter }) {
  const [filter, setFilter] = useState(first);
  const {
    data: stock,
    isError,
    isPlaceholderData,
  } = useQuery({
    ...stockQuery(filter),
    placeholderData: keepPreviousData,
  });

  function choose(next: StockFilter) {
    setFilter(next);
    // The address follows, so that a reload or a shared link shows the same.
    window.history.replaceState(null, "", `/stock${filterQuery(next)}`);
  }

  const shelf = stock ? layOutShelf(stock) : null;
  const filtered = Object.keys(filterValues(filter)).length > 0;
  return (
    <>
      <PageHeader
        title="Stock"
        titleInBar
        lead="Sorted and ready. Hatched is reserved for a run."
        figures={
          shelf ? (
            <>
              <Figure
                label="On the shelf"
                value={formatKg(shelf.grams, 2)}
                unit="kg"
                align="right"
              />
              <Figure
                label="Reserved"
                value={formatKg(shelf.reservedGrams, 2)}
                unit="kg"
                align="right"
              />
              <Figure
                label="Free to use"
                value={formatKg(shelf.freeGrams, 2)}
                unit="kg"
                tone="ok"
                align="right"
              />
            </>
          ) : null
        }
      />
      <StockLinks />
      <StockFilters filter={filter} onFilter={choose} />
      {isError ? (
        <Notice tone="warn" title="The server did not answer" live="status" className="mb-4">
          What stands here is the last that arrived; the page goes on asking.
        </Notice>
      ) : null}
      {!stock || !shelf ? (
        <Skeleton shape="wells" label="Loading the stock" />
      ) : shelf.grams === 0 ? (
        <EmptyState title={filtered ? "Nothing of this on the shelf" : "The shelf is empty"}>
          {filtered
            ? "Choose another kind, form or wash state, or all of them."
            : "What is sorted stands here by polymer and colour. Weigh a bag in and sort it first."}
        </EmptyState>
      ) : (
        <div className={isPlaceholderData ? "opacity-60 motion-safe:transition-opacity" : ""}>
          <ShelfGrid shelf={shelf} filter={filter} />
          <ShelfSections shelf={shelf} filter={filter} />
        </div>
      )}
      {stock ? (
        <>
          <p className="mt-3 text-sm text-soft">
            kg by polymer and colour{filtered ? ", as filtered" : ", all kinds and forms"}. Weighed
            in today: {stock.today.bags} {stock.today.bags === 1 ? "bag" : "bags"},{" "}
            {formatKg(stock.today.grams, 2)} kg.
          </p>
          <div className="mt-6 flex flex-wrap items-end gap-x-10 gap-y-4 border-t border-rule pt-5">
            <Figure
              label="Waiting to be sorted"
              value={formatKg(stock.unsorted.grams, 2)}
              unit="kg"
              note={
                <Link href="/sorting" className="link inline-flex min-h-11 items-center font-bold">
                  {stock.unsorted.bags} {stock.unsorted.bags === 1 ? "bag" : "bags"}, go to sorting
                </Link>
              }
            />
            <Figure
              label="In the reject bin"
              value={formatKg(stock.rejectGrams, 2)}
              unit="kg"
              note={
                <span className="inline-flex min-h-11 items-center">Until it is taken away</span>
              }
            />
          </div>
        </>
      ) : null}
    </>
  );
}
