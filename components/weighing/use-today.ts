"use client";

import { queryOptions, useQuery } from "@tanstack/react-query";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import type { todayEndpoint } from "@/lib/weighing/contract/weigh-ins";
import { TODAY_ADDRESS } from "@/lib/weighing/terms";

/** Today's tickets, kept fresh while the page is open: others weigh at the same desk. */
export const todayQuery = (limit: number) =>
  queryOptions({
    queryKey: ["weigh-ins", "today", limit],
    queryFn: async ({ signal }) => {
      const today = await fetchEndpoint<typeof todayEndpoint>(
        TODAY_ADDRESS,
        { limit: String(limit) },
        signal,
      );
      // A phone's clock may be wrong; undo's ten minutes run by the server's.
      return { ...today, clockAheadMs: Date.now() - today.now };
    },
    refetchInterval: 30_000,
  });

export function useToday(limit: number) {
  return useQuery(todayQuery(limit));
}
