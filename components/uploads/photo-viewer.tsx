"use client";

import { useEffect, useRef, useState, type KeyboardEvent } from "react";
import { Button } from "@/components/ui/button";
import { Icon } from "@/components/ui/icon";
import { dayOf, formatDay, instant } from "@/lib/core/time";
import type { Photo } from "@/lib/uploads/contract";
import { photoAddress } from "./photo-address";
import { photoAlt, type PhotoFacts } from "./photo-alt";
import { RemovePhoto } from "./remove-photo";

type Props = {
  photos: readonly Photo[];
  facts: PhotoFacts;
  /** Which one is shown; null while it is closed. */
  openId: string | null;
  onOpen: (id: string | null) => void;
  onRemoved: ((photo: Photo) => void) | null;
};

/** A finger that moved this far sideways, in px, turned the page. */
const SWIPE_PIXELS = 48;

/**
 * One picture as large as the screen allows. It is the browser's own modal dialog: Escape closes it, and the
 * focus goes back to the small picture that opened it.
 */
export function PhotoViewer({ photos, facts, openId, onOpen, onRemoved }: Props) {
  const box = useRef<HTMLDialogElement>(null);
  const start = useRef<number | null>(null);
  const [removing, setRemoving] = useState(false);
  const index = photos.findIndex(({ id }) => id === openId);
  const photo = photos[index];
  const open = photo !== undefined;

  useEffect(() => {
    const element = box.current;
    if (!element) return;
    if (open && !element.open) element.showModal();
    if (!open && element.open) element.close();
  }, [open]);

  const close = () => {
    setRemoving(false);
    onOpen(null);
  };
  const turn = (by: number) => {
    const next = photos[index + by];
    if (!next) return;
    setRemoving(false);
    onOpen(next.id);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const by = { ArrowLeft: -1, ArrowRight: 1 }[event.key];
    const end = { Home: photos[0], End: photos.at(-1) }[event.key];
    if (by === undefined && !end) return;
    event.preventDefault();
    if (by !== undefined) turn(by);
    else if (end) onOpen(end.id);
  };

  return (
    <dialog
      ref={box}
      aria-label="Photo"
      onKeyDown={onKeyDown}
      onCancel={(event) => {
        event.preventDefault();
        close();
      }}
      onClose={() => {
        if (open) close();
      }}
      className="m-auto h-dvh max-h-none w-full max-w-none bg-paper text-ink backdrop:bg-veil open:flex open:flex-col wide:h-[94dvh] wide:w-[94vw] wide:rounded-ticket wide:border wide:border-rule"
    >
      {photo ? (
        <>
          <div className="flex items-center justify-between gap-3 py-2 pr-2 pl-4">
            <p aria-live="polite" className="text-sm font-bold">
              {photos.length > 1 ? `Photo ${index + 1} of ${photos.length}` : "Photo"}
              {photo.purpose === "chip" ? ", chip photo" : ""}
            </p>
            <button
              type="button"
              onClick={close}
              aria-label="Close"
              className="grid size-11 shrink-0 place-items-center rounded-control hover:bg-well"
            >
              <Icon name="close" />
            </button>
          </div>
          <div
            className="relative min-h-0 grow touch-pan-y touch-pinch-zoom bg-well"
            onPointerDown={(event) => {
              start.current = event.isPrimary ? event.clientX : null;
            }}
            onPointerUp={(event) => {
              if (start.current === null || !event.isPrimary) return;
              const moved = event.clientX - start.current;
              start.current = null;
              if (Math.abs(moved) >= SWIPE_PIXELS) turn(moved < 0 ? 1 : -1);
            }}
            onPointerCancel={() => {
              start.current = null;
            }}
          >
            <img
              key={`${photo.id} small`}
              src={photoAddress(photo.id, "thumb")}
              alt=""
              draggable={false}
              className="absolute inset-0 size-full object-contain opacity-60"
            />
            <img
              key={photo.id}
              src={photoAddress(photo.id, "large")}
              alt={photoAlt(facts, photo, index + 1, photos.length)}
              width={photo.width}
              height={photo.height}
              draggable={false}
              className="absolute inset-0 size-full object-contain select-none"
            />
            <TurnButton to="previous" shown={index > 0} onTurn={() => turn(-1)} />
            <TurnButton to="next" shown={index < photos.length - 1} onTurn={() => turn(1)} />
          </div>
          <div className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 px-4 pt-3 pb-[calc(0.75rem+env(safe-area-inset-bottom,0px))]">
            <p className="min-w-0 grow basis-52 text-sm">
              <strong className="block">{photoAlt(facts, photo, 1, 1)}</strong>
              <span className="text-soft">
                Added {formatDay(dayOf(instant(photo.addedAt), facts.timeZone))} by{" "}
                {photo.addedBy ?? "somebody who has left"}
              </span>
            </p>
            {onRemoved === null ? null : removing ? (
              <RemovePhoto
                photo={photo}
                onKeep={() => setRemoving(false)}
                onRemoved={() => {
                  const beside = photos[index + 1] ?? photos[index - 1];
                  setRemoving(false);
                  onOpen(beside?.id ?? null);
                  onRemoved(photo);
                }}
              />
            ) : (
              <Button variant="danger" size="small" onClick={() => setRemoving(true)}>
                Remove photo
              </Button>
            )}
          </div>
        </>
      ) : null}
    </dialog>
  );
}

function TurnButton({
  to,
  shown,
  onTurn,
}: {
  to: "previous" | "next";
  shown: boolean;
  onTurn: () => void;
}) {
  if (!shown) return null;
  return (
    <button
      type="button"
      aria-label={to === "next" ? "Next photo" : "Previous photo"}
      onClick={onTurn}
      className={`absolute top-1/2 grid size-13 -translate-y-1/2 place-items-center rounded-full border border-rule bg-card text-ink ${to === "next" ? "right-3" : "left-3"}`}
    >
      <Icon name={to === "next" ? "forward" : "back"} />
    </button>
  );
}
