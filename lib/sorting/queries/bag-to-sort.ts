/** One bag on the table: what its piles must add up to, or how it was sorted. */
import "server-only";
import type * as z from "zod";
import { getBagByCode } from "@/lib/bags/queries";
import { formatCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import type { BagId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { judgeUndo, undoUntil } from "@/lib/core/undo";
import { heldBy } from "@/lib/ledger/queries/entries";
import { UNSORTED } from "@/lib/ledger/terms";
import { actorId, allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { BagToSort, bagToSortEndpoint, SortedBag } from "../contract/sortings";
import { draftOf } from "./drafts";
import { asSorted, listFractions } from "./fractions";
import { getWeighedBag, listLoads } from "./table";

/**
 * @throws AppError `unknown-code` when the code is no bag's
 */
export function getBagToSort(
  ctx: Context,
  input: z.output<typeof bagToSortEndpoint.input>,
): BagToSort {
  allow(ctx, "sorting.record");
  return inSnapshot<BagToSort>(ctx, (db) => {
    const bag = getBagByCode(db, input.code);
    if (!bag) throw new AppError("unknown-code", { code: formatCode(input.code) }, ["code"]);
    const weighed = getWeighedBag(db, bag.id, bag.code);
    return {
      helperId: actorId(ctx),
      code: bag.code,
      state: bag.state,
      pointName: bag.pointName,
      weighedAt: weighed?.occurredAt ?? null,
      condition: weighed?.condition ?? null,
      netGrams: weighed ? heldBy(db, weighed.holderId, UNSORTED) : 0,
      readings: weighed ? listLoads(db, weighed) : [],
      scaleId: weighed?.scaleId ?? null,
      draft: draftOf(db, bag.id),
      sorted: findSorted(db, ctx, bag.id),
    };
  });
}

type SessionRow = Omit<SortedBag, "fractions" | "undoUntil" | "recordedAt"> & {
  doneBy: string;
  recordedAt: Instant;
};

/** The sorting that counts; null for a bag that waits, or went straight into a lot at the scale. */
function findSorted(db: Readable, ctx: Context, bagId: BagId): SortedBag | null {
  const row = prepared(
    db.client,
    `select s.id as sortingId, s.state, s.net_grams as netGrams, s.difference_grams as differenceGrams,
            s.cause, s.done_by as doneBy, p.name as byName, s.recorded_at as recordedAt
       from sorting_bags sb
       join sorting_sessions s on s.id = sb.session_id
       join people p on p.id = s.done_by
      where sb.bag_id = ? and sb.live = 1`,
  ).get(bagId) as SessionRow | undefined;
  if (!row) return null;
  const { doneBy, ...session } = row;
  const mine = judgeUndo({ ...row, doneBy }, actorId(ctx), ctx.now) === "fine";
  return {
    ...session,
    fractions: listFractions(db, row.sortingId).map(asSorted),
    undoUntil: mine ? undoUntil(row.recordedAt) : null,
  };
}
