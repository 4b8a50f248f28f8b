"use client";

import Link from "next/link";
import { useOutbox } from "@/components/forms/use-outbox";

/**
 * "3 waiting to send": what was saved on this phone and has no receipt yet. It is on every signed-in page and
 * keeps sending. Nothing is shown while nothing waits.
 */
export function QueueIndicator() {
  const { waiting, refused } = useOutbox();
  return (
    <span role="status" className="contents">
      {refused > 0 ? (
        <QueueLink tone="text-bad bg-bad-soft">
          {refused} to look at{waiting > 0 ? `, ${waiting} waiting` : ""}
        </QueueLink>
      ) : waiting > 0 ? (
        <QueueLink tone="text-warn bg-warn-soft">{waiting} waiting to send</QueueLink>
      ) : null}
    </span>
  );
}

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
