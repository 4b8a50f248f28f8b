"use client";

import Link from "next/link";
import { useOutbox } from "@/components/forms/use-outbox";
import { usePhotoSignal } from "../uploads/use-photo-signal";

/**
 * "3 waiting to send": what was saved on this phone and has no receipt yet; or, when no ticket waits, how many
 * photos do. It is on every signed-in page and keeps sending. Nothing is shown while nothing waits.
 */
export function QueueIndicator() {
  const { waiting, refused } = useOutbox();
  const photos = usePhotoSignal();
  return (
    <span role="status" className="contents">
      {refused > 0 ? (
        <QueueLink tone="text-bad bg-bad-soft">
          {refused} to look at{waiting > 0 ? `, ${waiting} waiting` : ""}
        </QueueLink>
      ) : waiting > 0 ? (
        <QueueLink tone="text-warn bg-warn-soft">{waiting} waiting to send</QueueLink>
      ) : photos.toLookAt > 0 ? (
        <QueueLink tone="text-bad bg-bad-soft">
          {countOfPhotos(photos.toLookAt)} to look at
        </QueueLink>
      ) : photos.waiting > 0 ? (
        <QueueLink tone="text-warn bg-warn-soft">{countOfPhotos(photos.waiting)} to send</QueueLink>
      ) : null}
    </span>
  );
}

const countOfPhotos = (count: number): string => (count === 1 ? "1 photo" : `${count} photos`);

function QueueLink({ tone, children }: { tone: string; children: React.ReactNode }) {
  return (
    <Link
      href={{ pathname: "/weigh-in", hash: "waiting" }}
      className={`inline-flex min-h-11 items-center text-sm font-bold no-underline`}
    >
      <span className={`rounded-full px-3 py-1 ${tone}`}>{children}</span>
    </Link>
  );
}
