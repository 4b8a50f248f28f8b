"use client";

import { useCallback } from "react";
import { Button } from "@/components/ui/button";
import type { PhotoItem } from "@/lib/offline/photo-queue";
import { photoStateWords } from "./photo-words";
import { photoBox } from "./shared-photo-box";

type Props = {
  item: PhotoItem;
  /** What it is called here: "Photo 2", "Photo of 14:32". */
  name: string;
  percent: number | undefined;
};

/** One picture that is not on the server yet: how far it is, and what can be done. */
export function QueuedPhoto({ item, name, percent }: Props) {
  const { photoId, state, trouble, blob } = item;
  const words = photoStateWords(item, percent);
  const picture = useCallback(
    (element: HTMLImageElement | null) => {
      if (!element) return;
      const address = URL.createObjectURL(blob);
      element.src = address;
      return () => URL.revokeObjectURL(address);
    },
    [blob],
  );
  const maySendAgain =
    state === "stopped" ||
    (state === "waiting" && trouble !== null) ||
    (state === "refused" && trouble?.code === "photos-too-many");
  const act = (words: string, work: () => Promise<void>, danger = false) => (
    <Button
      variant={danger ? "danger" : "quiet"}
      size="small"
      aria-label={`${words}: ${name}`}
      onClick={() => void work()}
    >
      {words}
    </Button>
  );
  return (
    <li className="flex min-w-0 items-center gap-3 rounded-control border border-rule bg-card p-2">
      <img
        ref={picture}
        alt=""
        width={56}
        height={56}
        className="size-14 shrink-0 rounded-plate border border-rule object-cover"
      />
      <div className="min-w-0 grow">
        <p className="text-sm font-bold">{name}</p>
        <p
          role={state === "refused" ? "alert" : undefined}
          className={`text-sm ${state === "refused" ? "font-bold text-bad" : "text-soft"}`}
        >
          {words}
        </p>
        {state === "sending" ? <Bar name={name} percent={percent ?? 0} words={words} /> : null}
        {state === "sending" || (state === "waiting" && !maySendAgain) ? null : (
          <div className="mt-1.5 flex flex-wrap gap-2">
            {maySendAgain ? act("Try again", () => photoBox().retry(photoId)) : null}
            {act("Delete", () => photoBox().drop(photoId), true)}
          </div>
        )}
      </div>
      {state === "sending" ? act("Cancel", () => photoBox().cancel(photoId)) : null}
    </li>
  );
}

function Bar({ name, percent, words }: { name: string; percent: number; words: string }) {
  return (
    <div
      role="progressbar"
      aria-label={`${name}, sending`}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent}
      aria-valuetext={words}
      className="mt-1.5 h-2 overflow-hidden rounded-full bg-well"
    >
      <div className="h-full bg-act" style={{ width: `${percent}%` }} />
    </div>
  );
}
