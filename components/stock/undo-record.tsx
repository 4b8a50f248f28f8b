"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import type { Endpoint } from "@/lib/core/endpoint";

type Props = {
  /** "/api/counts/{id}/undo" */
  path: Endpoint["path"];
  id: string;
  /** Until when it is open, by the program's clock. */
  until: number;
  /** What is undone, read aloud: "the count of lot 12". */
  what: string;
  onUndone?: () => void;
};

/** Undo, with the time that is left for it. */
export function UndoRecord({ path, id, until, what, onUndone }: Props) {
  const router = useRouter();
  const undo = useCommand<Endpoint>({ method: "POST", path });
  const [left, setLeft] = useState<number | null>(null);
  useEffect(() => {
    const tick = () => setLeft(until - Date.now());
    const first = setTimeout(tick, 0);
    const timer = setInterval(tick, 1000);
    return () => {
      clearTimeout(first);
      clearInterval(timer);
    };
  }, [until]);

  async function press() {
    const result = await undo.send({ id });
    if (result.kind !== "done") return;
    onUndone?.();
    router.refresh();
  }

  const said = undo.problem?.detail ?? (undo.unreachable ? UNANSWERED_SENTENCE : null);
  if (left !== null && left <= 0 && said === null) return null;
  const seconds = Math.max(0, Math.floor((left ?? 0) / 1000));
  return (
    <span className="inline-flex flex-wrap items-center gap-x-3 gap-y-1">
      <Button
        variant="quiet"
        size="small"
        busy={undo.pending}
        onClick={() => void press()}
        aria-label={`Undo ${what}`}
      >
        Undo
        {left === null ? null : (
          <span aria-hidden className="font-mono text-sm font-normal">
            {Math.floor(seconds / 60)}:{String(seconds % 60).padStart(2, "0")}
          </span>
        )}
      </Button>
      {said ? (
        <span role="alert" className="text-sm font-bold text-bad">
          {said}
        </span>
      ) : null}
    </span>
  );
}
