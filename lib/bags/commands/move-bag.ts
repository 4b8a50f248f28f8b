/** Steps of larger commands: rounds, weighing and sorting move bags on. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import { formatCode } from "@/lib/core/bag-code";
import type { BagId, PointId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { prepared, type Tx } from "@/lib/platform/database";
import { getPoint } from "@/lib/points/queries";
import { getBagById, type Bag } from "../queries";
import { mayMove } from "../rules/bag-states";
import { BAG_STATE_NAMES, type BagState } from "../terms";

/**
 * Brings a bag into a state.
 *
 * @throws AppError `not-found`, `bag-wrong-state` when its present state does not lead there
 */
export function moveBagIn(tx: Tx, bagId: BagId, state: BagState, now: Instant): void {
  const bag = requireBag(tx, bagId);
  if (!mayMove(bag.state, state)) {
    throw new AppError("bag-wrong-state", {
      code: formatCode(bag.code),
      state: BAG_STATE_NAMES[bag.state].toLowerCase(),
    });
  }
  prepared(tx.client, "update bags set state = ?, state_since = ? where id = ?").run(
    state,
    now,
    bagId,
  );
}

/** What a bag was before a command changed it, for taking that back. */
export type BagBefore = { state: BagState; since: Instant; pointId: PointId | null };

/** Takes a bag back to what it was, as part of undoing what changed it. */
export function restoreBagIn(tx: Tx, bagId: BagId, before: BagBefore): void {
  requireBag(tx, bagId);
  prepared(tx.client, "update bags set state = ?, state_since = ?, point_id = ? where id = ?").run(
    before.state,
    before.since,
    before.pointId,
    bagId,
  );
}

/**
 * Says from which point a bag is, where its tag was ordered for none yet. A bag that has a point keeps it.
 *
 * @throws AppError `not-found`, `unknown-point` for a missing or closed point
 */
export function assignPointIn(tx: Tx, bagId: BagId, pointId: PointId): void {
  const bag = requireBag(tx, bagId);
  if (bag.pointId !== null) return;
  const point = getPoint(tx, pointId);
  if (!point || point.closedAt !== null) throw new AppError("unknown-point", {}, ["pointId"]);
  prepared(tx.client, "update bags set point_id = ? where id = ?").run(pointId, bagId);
}

function requireBag(tx: Tx, bagId: BagId): Bag {
  const bag = getBagById(tx, bagId);
  if (!bag) throw new AppError("not-found");
  return bag;
}
