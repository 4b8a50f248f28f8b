"use client";

import Link from "next/link";
import { UnreachableError } from "@/components/forms/problem-document";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { formatCode } from "@/lib/core/bag-code";
import { useDeskLists } from "../weighing/use-desk-lists";
import { SortedBagTicket } from "./sorted-bag-ticket";
import { SortingTable } from "./sorting-table";
import { useBag, useRejectReasons } from "./use-table";

/** One bag: to be sorted, or as it was sorted. */
export function BagOnTable({ code }: { code: string }) {
  const bag = useBag(code);
  const lists = useDeskLists();
  const reasons = useRejectReasons();
  const error = bag.error ?? lists.error ?? reasons.error;
  const retry = () => void Promise.all([bag.refetch(), reasons.refetch()]);

  if (bag.data && bag.data.state === "weighed" && lists.ready && reasons.data) {
    return (
      <SortingTable key={bag.data.code} bag={bag.data} lists={lists} reasons={reasons.data.items} />
    );
  }
  return (
    <>
      <PageHeader
        title={`Sorting ${formatCode(code)}`}
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      {bag.data?.sorted ? (
        <SortedBagTicket bag={bag.data} sorted={bag.data.sorted} />
      ) : bag.data && bag.data.state !== "weighed" ? (
        <Notice
          tone="info"
          title={
            bag.data.state === "sorted" || bag.data.state === "closed"
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
            <button type="button" onClick={retry} className="link min-h-11 font-bold">
              Try again
            </button>
          }
        >
          {error instanceof UnreachableError
            ? "Piles that were weighed already are kept on this device."
            : "Check the code against the tag."}
        </Notice>
      ) : (
        <Skeleton shape="tickets" count={3} label="Loading the bag" />
      )}
    </>
  );
}
