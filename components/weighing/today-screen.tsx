"use client";

import { QueryProvider } from "@/components/forms/query-provider";
import { TodayTickets } from "./today-tickets";

/** A busy day at one shed; more are only counted. */
const SHOWN = 200;

/** The day so far: every ticket, by whoever weighed. */
export function TodayScreen() {
  return (
    <QueryProvider>
      <div className="max-w-2xl">
        <TodayTickets limit={SHOWN} />
      </div>
    </QueryProvider>
  );
}
