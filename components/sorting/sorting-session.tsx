"use client";

import { useEffect } from "react";
import { ProblemError } from "@/components/forms/problem-document";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Skeleton } from "@/components/ui/skeleton";
import { useDeskLists } from "../weighing/use-desk-lists";
import { useToday } from "../weighing/use-today";
import { SortingTable } from "./sorting-table";
import { useSession } from "./use-session";
import { useRejectReasons } from "./use-table";

/** A session under way, or a new one with the bags that it is started with. */
export function SortingSession({ id, first }: { id: string; first: readonly string[] }) {
  // Whose session this is: what is kept on a shared phone belongs to one helper.
  const today = useToday(1);
  const helperId = today.data?.helperId ?? null;
  const session = useSession(id, helperId, first);
  const lists = useDeskLists();
  const reasons = useRejectReasons();
  const started = session.state.base.version > 0;
  useEffect(() => {
    // From now on the address alone finds it, here and on another phone.
    if (started) window.history.replaceState(null, "", `/sorting/table/${id}`);
  }, [started, id]);
  const error = today.error ?? lists.error ?? reasons.error;

  if (helperId !== null && today.data && session.ready && lists.ready && reasons.data) {
    return (
      <SortingTable
        id={id}
        session={session}
        helperId={helperId}
        timeZone={today.data.timeZone}
        lists={lists}
        reasons={reasons.data.items}
      />
    );
  }
  return (
    <>
      <PageHeader
        title="Sorting"
        titleInBar
        back={{ href: "/sorting", label: "Back to bags that wait" }}
      />
      {error ? (
        <Notice
          tone="warn"
          title={error instanceof ProblemError ? error.message : "The server did not answer"}
          live="status"
          action={
            <button
              type="button"
              onClick={() => void Promise.all([today.refetch(), reasons.refetch()])}
              className="link min-h-11 font-bold"
            >
              Try again
            </button>
          }
        >
          Piles that were weighed already are kept on this phone.
        </Notice>
      ) : (
        <Skeleton shape="tickets" count={3} label="Loading the table" />
      )}
    </>
  );
}
