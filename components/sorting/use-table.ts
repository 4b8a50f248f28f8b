"use client";

import { queryOptions, useQuery } from "@tanstack/react-query";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import type {
  bagToSortEndpoint,
  rejectReasonsEndpoint,
  waitingBagsEndpoint,
} from "@/lib/sorting/contract";
import {
  BAG_TO_SORT_ADDRESS,
  REJECT_REASONS_ADDRESS,
  WAITING_BAGS_ADDRESS,
} from "@/lib/sorting/terms";
import type { listLotsEndpoint } from "@/lib/stock/contract/lots";

const LOTS_ADDRESS = { method: "GET", path: "/api/lots" } as const;

/** One bag on the table. It is not asked for again by itself: the net must not change under a half sorted bag. */
export const bagQuery = (code: string) =>
  queryOptions({
    queryKey: ["sorting", "bag", code],
    queryFn: async ({ signal }) => {
      const bag = await fetchEndpoint<typeof bagToSortEndpoint>(
        BAG_TO_SORT_ADDRESS,
        { code },
        signal,
      );
      return bag;
    },
    refetchOnWindowFocus: false,
    staleTime: 60_000,
  });

export function useBag(code: string) {
  return useQuery(bagQuery(code));
}

/** The first page of bags that wait, kept fresh: others weigh and sort meanwhile. */
export function useWaitingBags(after: string | undefined) {
  return useQuery({
    queryKey: ["sorting", "waiting", after ?? ""],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof waitingBagsEndpoint>(WAITING_BAGS_ADDRESS, { after }, signal),
    refetchInterval: 20_000,
  });
}

export function useRejectReasons() {
  return useQuery({
    queryKey: ["reject-reasons"],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof rejectReasonsEndpoint>(REJECT_REASONS_ADDRESS, {}, signal),
    staleTime: 5 * 60_000,
  });
}

/** The open lots, by what goes into them: "to lot 118" or "new lot" beside a pile. */
export function useOpenLots() {
  return useQuery({
    queryKey: ["lots", "open"],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof listLotsEndpoint>(LOTS_ADDRESS, { state: "open" }, signal),
    select: ({ lots }) =>
      new Map(
        lots.map((lot) => [
          [lot.polymer, lot.kind, lot.colourCode, lot.form, lot.wash].join("|"),
          lot.number,
        ]),
      ),
  });
}
