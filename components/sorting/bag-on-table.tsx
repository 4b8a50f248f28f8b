"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useEffect } from "react";
import { UnreachableError } from "@/components/forms/problem-document";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { formatCode } from "@/lib/core/bag-code";
import { newId } from "@/lib/core/ids";
import type { BagToSort } from "@/lib/sorting/contract/sortings";
import { listKept } from "./kept-tables";
import { useBag } from "./use-table";

/** Where a bag is on the table, was sorted, or can be sorted now; null when there is nothing to sort. */
function tableOf(bag: BagToSort): `/sorting/${string}` | null {
  if (bag.sorted) return `/sorting/sessions/${bag.sorted.sortingId}`;
  if (bag.state !== "weighed") return null;
  if (bag.draft) return `/sorting/table/${bag.draft.id}`;
  const kept = listKept(bag.helperId).find(({ table }) => table.codes.includes(bag.code));
  return kept ? `/sorting/table/${kept.id}` : `/sorting/table/${newId()}?bags=${bag.code}`;
}

/** One bag by its tag: goes on to its table, or says why it is on none. */
export function BagOnTable({ code }: { code: string }) {
  const router = useRouter();
  const { data: bag, error, refetch } = useBag(code);
  const nothing = bag && !bag.sorted && bag.state !== "weighed";
  useEffect(() => {
    const address = bag ? tableOf(bag) : null;
    if (address) router.replace(address);
  }, [bag, router]);

  return (
    <>
      <PageHeader
        title={`Sorting ${formatCode(code)}`}
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      {nothing ? (
        <Notice
          tone="info"
          title={
            bag.state === "sorted" || bag.state === "closed"
              ? "This bag went straight into its lot at the scale."
              : "This bag has not been weighed in yet."
          }
          action={
            <Link href="/weigh-in" className="link inline-flex min-h-11 items-center font-bold">
              Go to weigh-in
            </Link>
          }
        >
          There is nothing to sort.
        </Notice>
      ) : error ? (
        <Notice
          tone="warn"
          title={error instanceof UnreachableError ? "The server did not answer" : error.message}
          live="status"
          action={
            <button
              type="button"
              onClick={() => void refetch()}
              className="link min-h-11 font-bold"
            >
              Try again
            </button>
          }
        >
          {error instanceof UnreachableError
            ? "Piles that were weighed already are kept on this phone."
            : "Check the code against the tag."}
        </Notice>
      ) : (
        <Skeleton shape="tickets" count={3} label="Loading the bag" />
      )}
    </>
  );
}
