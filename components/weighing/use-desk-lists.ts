"use client";

import { useQuery } from "@tanstack/react-query";
import { fetchEndpoint, type OutputOf } from "@/components/forms/fetch-endpoint";
import type { listPointsEndpoint } from "@/lib/points/contract";
import type { listContainersEndpoint } from "@/lib/scales/contract/containers";
import type { listScalesEndpoint } from "@/lib/scales/contract/scales";
import type { listColoursEndpoint } from "@/lib/stock/contract/palette";
import { COLOURS, CONTAINERS, POINTS, SCALES } from "./addresses";

/** Lists of a desk change rarely; a page that stays open all day still sees a new crate. */
const LIST = { staleTime: 5 * 60_000, refetchInterval: 10 * 60_000 } as const;

export type DeskScale = OutputOf<typeof listScalesEndpoint>["items"][number];
export type DeskContainer = OutputOf<typeof listContainersEndpoint>["items"][number];
export type DeskColour = OutputOf<typeof listColoursEndpoint>["items"][number];
export type DeskPoint = OutputOf<typeof listPointsEndpoint>["items"][number];

export type DeskLists = {
  scales: readonly DeskScale[];
  containers: readonly DeskContainer[];
  /** Those that can still be chosen. */
  colours: readonly DeskColour[];
  points: readonly DeskPoint[];
  /** Scales and tares are there: without them nothing can be weighed. */
  ready: boolean;
  /** The first list that could not be read. */
  error: Error | null;
};

const NONE: readonly never[] = [];

/** What the weigh-in form offers. */
export function useDeskLists(): DeskLists {
  const scales = useQuery({
    queryKey: ["scales"],
    queryFn: ({ signal }) => fetchEndpoint<typeof listScalesEndpoint>(SCALES, {}, signal),
    ...LIST,
  });
  const containers = useQuery({
    queryKey: ["containers"],
    queryFn: ({ signal }) => fetchEndpoint<typeof listContainersEndpoint>(CONTAINERS, {}, signal),
    ...LIST,
  });
  const colours = useQuery({
    queryKey: ["colours"],
    queryFn: ({ signal }) => fetchEndpoint<typeof listColoursEndpoint>(COLOURS, {}, signal),
    select: ({ items }) => items.filter((colour) => colour.retiredAt === null),
    ...LIST,
  });
  const points = useQuery({
    queryKey: ["points"],
    queryFn: ({ signal }) => fetchEndpoint<typeof listPointsEndpoint>(POINTS, {}, signal),
    ...LIST,
  });
  return {
    scales: scales.data?.items ?? NONE,
    containers: containers.data?.items ?? NONE,
    colours: colours.data ?? NONE,
    points: points.data?.items ?? NONE,
    ready: scales.data !== undefined && containers.data !== undefined,
    error: scales.error ?? containers.error ?? colours.error ?? points.error,
  };
}
