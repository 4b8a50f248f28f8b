"use client";

import { useEffect, useRef } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import type { Photo, removePhotoEndpoint } from "@/lib/uploads/contract";

const ADDRESS = { method: "DELETE", path: "/api/photos/{id}" } as const;

type Props = { photo: Photo; onKeep: () => void; onRemoved: () => void };

/** Asks once before a photo goes for good. */
export function RemovePhoto({ photo, onKeep, onRemoved }: Props) {
  const remove = useCommand<typeof removePhotoEndpoint>(ADDRESS);
  const box = useRef<HTMLDivElement>(null);
  // The button that asked is gone; the answer that changes nothing gets the focus.
  useEffect(() => box.current?.querySelector("button")?.focus(), []);
  const send = async () => {
    const result = await remove.send({ id: photo.id });
    // Somebody else was quicker: it is gone either way.
    const gone = result.kind === "refused" && result.problem.code === "not-found";
    if (result.kind === "done" || gone) onRemoved();
  };
  const said =
    remove.problem?.detail ?? (remove.unreachable ? UNANSWERED_SENTENCE : "Remove it for good?");
  return (
    <div
      ref={box}
      role="group"
      aria-label="Remove photo"
      className="flex flex-wrap items-center gap-2"
    >
      <p role="status" className="basis-full text-sm font-bold wide:basis-auto">
        {said}
      </p>
      <Button variant="quiet" size="small" onClick={onKeep}>
        Keep it
      </Button>
      <Button variant="danger" size="small" busy={remove.pending} onClick={() => void send()}>
        Remove
      </Button>
    </div>
  );
}
