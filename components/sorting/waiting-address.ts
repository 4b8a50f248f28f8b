/** What the list of waiting bags is narrowed to, as it stands in the page's address. */
import { isUuidV7, type PointId } from "@/lib/core/ids";
import { POLYMER_ANSWERS } from "@/lib/core/plastics";
import type { WaitingFilter } from "@/lib/sorting/contract/waiting";
import { CONDITIONS } from "@/lib/weighing/terms";

/** Whatever cannot be read there is left out. */
export function readFilter(query: Pick<URLSearchParams, "get">): WaitingFilter {
  const point = query.get("q")?.trim().slice(0, 80);
  const pointId = query.get("point") ?? "";
  return {
    pointId: isUuidV7(pointId) ? (pointId as PointId) : undefined,
    polymer: POLYMER_ANSWERS.find((polymer) => polymer === query.get("polymer")),
    condition: CONDITIONS.find((condition) => condition === query.get("condition")),
    point: point === "" ? undefined : point,
  };
}

export function isNarrowed(filter: WaitingFilter): boolean {
  return Object.values<unknown>(filter).some((value) => value !== undefined);
}

/** "/sorting?polymer=PP&after=…", or "/sorting" when nothing is left out. */
export function waitingAddress(filter: WaitingFilter, after?: string): string {
  const query = new URLSearchParams();
  const { pointId, polymer, condition, point } = filter;
  for (const [name, value] of Object.entries({
    point: pointId,
    polymer,
    condition,
    q: point,
    after,
  })) {
    if (value) query.set(name, value);
  }
  const text = query.toString();
  return text === "" ? "/sorting" : `/sorting?${text}`;
}
