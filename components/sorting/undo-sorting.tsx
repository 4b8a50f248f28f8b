"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { undoSortingEndpoint } from "@/lib/sorting/contract/sortings";
import { UNDO_SORTING_ADDRESS } from "@/lib/sorting/terms";

type Props = { id: string; until: number };

/** Takes a sorting back, for as long as whoever saved it may. */
export function UndoSorting({ id, until }: Props) {
  const router = useRouter();
  const undo = useCommand<typeof undoSortingEndpoint>(UNDO_SORTING_ADDRESS);
  const [over, setOver] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setOver(true), Math.max(0, until - Date.now()));
    return () => clearTimeout(timer);
  }, [until]);

  async function takeBack() {
    const result = await undo.send({ id });
    if (result.kind === "done") router.refresh();
  }

  return (
    <>
      {over ? null : (
        <Button variant="quiet" busy={undo.pending} onClick={() => void takeBack()}>
          Undo this sorting
        </Button>
      )}
      {undo.problem || undo.unreachable ? (
        <Notice
          tone="bad"
          title={undo.unreachable ? "No answer" : "It was not undone"}
          live="alert"
          className="basis-full"
        >
          {undo.problem?.detail ?? UNANSWERED_SENTENCE}
        </Notice>
      ) : null}
    </>
  );
}
