"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { formatCode } from "@/lib/core/bag-code";
import type { Ticket, undoWeighInEndpoint } from "@/lib/weighing/contract/weigh-ins";
import { UNDO_WEIGH_IN_ADDRESS } from "@/lib/weighing/terms";

type Props = {
  ticket: Ticket & { undoUntil: number };
  /** How far this device's clock is ahead of the program's. */
  clockAheadMs: number;
};

/** Undo, with the time that is left for it. */
export function UndoButton({ ticket, clockAheadMs }: Props) {
  const queries = useQueryClient();
  const undo = useCommand<typeof undoWeighInEndpoint>(UNDO_WEIGH_IN_ADDRESS);
  const until = ticket.undoUntil + clockAheadMs;
  const [left, setLeft] = useState(() => until - Date.now());
  useEffect(() => {
    const timer = setInterval(() => setLeft(until - Date.now()), 1000);
    return () => clearInterval(timer);
  }, [until]);

  const press = async () => {
    await undo.send({ id: ticket.id });
    await queries.invalidateQueries({ queryKey: ["weigh-ins"] });
    await queries.invalidateQueries({ queryKey: ["scanned"] });
  };
  if (left <= 0 && !undo.problem) return null;
  const seconds = Math.max(0, Math.floor(left / 1000));
  return (
    <div className="flex flex-wrap items-center justify-end gap-x-3">
      {undo.problem || undo.unreachable ? (
        <p role="alert" className="text-sm font-bold text-bad">
          {undo.problem?.detail ?? UNREACHABLE_SENTENCE}
        </p>
      ) : null}
      {left > 0 ? (
        <Button
          variant="quiet"
          size="small"
          busy={undo.pending}
          onClick={() => void press()}
          aria-label={`Undo ${formatCode(ticket.code)}`}
        >
          Undo
          <span aria-hidden className="font-mono text-sm font-normal">
            {Math.floor(seconds / 60)}:{String(seconds % 60).padStart(2, "0")}
          </span>
        </Button>
      ) : null}
    </div>
  );
}
