/** What the form of a removal offers. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import { dayOf, type Day } from "@/lib/core/time";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot } from "@/lib/platform/database";
import { requireScheme } from "@/lib/platform/scheme";
import {
  listContainers,
  listScales,
  type Container,
  type Scale,
} from "@/lib/scales/queries/scales";
import type { Destination } from "../contract/destinations";
import type { RemovalSource } from "../terms";
import { readDestinations } from "./destinations";
import { getRejectBin } from "./reject-bin";

export type RemovalListsView = {
  destinations: Destination[];
  scales: Scale[];
  tares: Container[];
  today: Day;
  binGrams: number;
};

/**
 * @param correcting the removal that is corrected: its destination stays to be chosen though it may have left the list, and
 *   what it took is in its place again
 */
export function getRemovalLists(
  ctx: Context,
  correcting: {
    destinationId: Id<"destination">;
    source: RemovalSource;
    grams: number;
    differenceGrams: number;
  } | null = null,
): RemovalListsView {
  allow(ctx, "removals.record");
  return inSnapshot<RemovalListsView>(ctx, (db) => {
    const back =
      correcting?.source === "reject-bin" ? correcting.grams + correcting.differenceGrams : 0;
    return {
      destinations: readDestinations(db).filter(
        ({ id, retiredAt }) => retiredAt === null || id === correcting?.destinationId,
      ),
      scales: listScales(ctx).items,
      tares: listContainers(ctx).items,
      today: dayOf(ctx.now, requireScheme(db).timeZone),
      binGrams: getRejectBin(ctx).heldGrams + back,
    };
  });
}
