/** A removal's form as it is kept on a device, and taken up again. Plain data. */
import type { Day } from "@/lib/core/time";
import type { RemovalDraft } from "./removal-draft";

export type KeptRemoval = {
  /** Id of the request, and of the removal: after a lost answer a reload must not make a second one. */
  requestId: string;
  /** The day on which it was begun. */
  today: Day;
  draft: RemovalDraft;
};

type Offered = {
  today: Day;
  destinations: readonly { id: string }[];
  scales: readonly { id: string }[];
};

/**
 * A kept form for the page as it is now: what left the lists since has to be chosen again, and a day that nobody
 * chose is today.
 *
 * @param start the form as it begins; one that began with a lot takes up only what has that lot
 * @returns null when there is nothing to take up
 */
export function takenUp(
  kept: object | null,
  start: RemovalDraft,
  lists: Offered,
): KeptRemoval | null {
  if (!looksKept(kept)) return null;
  const { requestId, today, draft } = kept;
  const [wanted] = start.loads;
  const lot = wanted?.lot?.number;
  if (lot !== undefined && !draft.loads.some((load) => load.lot?.number === lot)) return null;
  const listed = (list: readonly { id: string }[], id: string) => list.some((one) => one.id === id);
  return {
    requestId,
    today: lists.today,
    draft: {
      ...start,
      ...draft,
      scaleId: listed(lists.scales, draft.scaleId) ? draft.scaleId : start.scaleId,
      destinationId: listed(lists.destinations, draft.destinationId)
        ? draft.destinationId
        : start.destinationId,
      day: draft.day === today ? lists.today : draft.day,
    },
  };
}

function looksKept(kept: object | null): kept is KeptRemoval {
  if (kept === null || !("requestId" in kept) || !("today" in kept) || !("draft" in kept)) {
    return false;
  }
  const { draft } = kept;
  return (
    typeof draft === "object" && draft !== null && "loads" in draft && Array.isArray(draft.loads)
  );
}

/** Is there anything in it that did not stand there from the beginning? */
export function isChanged(draft: RemovalDraft, start: RemovalDraft): boolean {
  return JSON.stringify(draft) !== JSON.stringify(start);
}
