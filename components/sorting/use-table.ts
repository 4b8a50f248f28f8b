"use client";

import { keepPreviousData, queryOptions, useQueries, useQuery } from "@tanstack/react-query";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import type { listDraftsEndpoint } from "@/lib/sorting/contract/drafts";
import type { bagToSortEndpoint, rejectReasonsEndpoint } from "@/lib/sorting/contract/sortings";
import type { waitingBagsEndpoint, WaitingFilter } from "@/lib/sorting/contract/waiting";
import {
  BAG_TO_SORT_ADDRESS,
  REJECT_REASONS_ADDRESS,
  WAITING_BAGS_ADDRESS,
} from "@/lib/sorting/terms";
import type { listLotsEndpoint, Material } from "@/lib/stock/contract/lots";
import type { PileDraft } from "./draft";

const LOTS_ADDRESS = { method: "GET", path: "/api/lots" } as const;
const DRAFTS_ADDRESS = { method: "GET", path: "/api/sortings/drafts" } as const;

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

/** All bags of a table; `bags` is null until each is known. */
export function useBags(codes: readonly string[]) {
  return useQueries({
    queries: codes.map((code) => bagQuery(code)),
    combine: (found) => {
      const known = found.flatMap(({ data }) => data ?? []);
      return {
        known,
        bags: known.length === codes.length ? known : null,
        error: found.find(({ error }) => error !== null)?.error ?? null,
      };
    },
  });
}

/** One page of bags that wait, kept fresh: others weigh and sort meanwhile. */
export function useWaitingBags(filter: WaitingFilter, after: string | undefined) {
  return useQuery({
    queryKey: ["sorting", "waiting", filter, after ?? ""],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof waitingBagsEndpoint>(WAITING_BAGS_ADDRESS, { ...filter, after }, signal),
    placeholderData: keepPreviousData,
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

/** What the lists of lots are asked by; null while a pile's material is not known. */
export function materialOf({
  polymer,
  kind,
  colourCode,
  form,
  wash,
}: Pick<PileDraft, "polymer" | "kind" | "colourCode" | "form" | "wash">): Material | null {
  return polymer === "" || kind === "" || colourCode === ""
    ? null
    : { polymer, kind, colourCode, form, wash };
}

/** The open lots of one material, first opened first: a pile goes to the first of them by itself. */
export function useOpenLots(material: Material | null) {
  return useQuery({
    queryKey: ["lots", "open", material],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof listLotsEndpoint>(LOTS_ADDRESS, { state: "open", ...material }, signal),
    select: ({ lots }) => lots,
    enabled: material !== null,
    staleTime: 60_000,
  });
}

/** Sessions that were put aside or are under way on any device. */
export function useDrafts() {
  return useQuery({
    queryKey: ["sorting", "drafts"],
    queryFn: ({ signal }) => fetchEndpoint<typeof listDraftsEndpoint>(DRAFTS_ADDRESS, {}, signal),
    select: ({ drafts }) => drafts,
    refetchInterval: 20_000,
  });
}
