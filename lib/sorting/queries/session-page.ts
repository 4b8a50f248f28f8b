/** A session as it was saved: its bags, piles and rejects, and what became of it. */
import "server-only";
import type { LabelCode } from "@/lib/core/bag-code";
import type { BagId, ScaleId, SortingId, WeighInId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { judgeUndo, undoUntil } from "@/lib/core/undo";
import type { LaterUses } from "@/lib/core/schemas";
import { heldBy, takenSince } from "@/lib/ledger/queries/entries";
import { listLaterUses } from "@/lib/ledger/queries/uses";
import { UNSORTED, type LossCause } from "@/lib/ledger/terms";
import { actorId, allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { Load } from "@/lib/scales/rules/loads";
import type { SortingState } from "../terms";
import { listFractions, type StoredFraction } from "./fractions";
import { getWeighedBag, listLoads } from "./table";
import { takenFromBags } from "./taken";

export type SortingPageBag = {
  code: LabelCode;
  pointName: string | null;
  weighInId: WeighInId | null;
  /** What its piles are made of, in grams: what the session took, and what corrections put back since. */
  netGrams: number;
  /** The readings behind it; they belong to the tolerance. */
  readings: Load[];
};

export type SortingPage = {
  id: SortingId;
  state: SortingState;
  byName: string;
  occurredAt: Instant;
  recordedAt: Instant;
  netGrams: number;
  differenceGrams: number;
  toleranceMilligrams: number;
  cause: LossCause | null;
  /** null when nothing was weighed on the table. */
  scale: { id: ScaleId; name: string } | null;
  bags: SortingPageBag[];
  fractions: StoredFraction[];
  /** The session in whose place it stands. */
  corrects: SortingId | null;
  /** Why it no longer stands. */
  correction: {
    /** null: erased. */
    reason: string | null;
    replacementId: string | null;
    byName: string;
    at: Instant;
  } | null;
  /** What was taken since from what it had filled. */
  later: LaterUses;
  /** null when it is not the reader's to undo, the time is over, or something was taken since. */
  undoUntil: number | null;
};

type Row = Pick<
  SortingPage,
  | "id"
  | "state"
  | "byName"
  | "occurredAt"
  | "recordedAt"
  | "netGrams"
  | "differenceGrams"
  | "toleranceMilligrams"
  | "cause"
  | "corrects"
> & { doneBy: string; actId: number };

/** One session by its id; null when there is none. */
export function getSortingPage(ctx: Context, id: string): SortingPage | null {
  allow(ctx, "sorting.record");
  return inSnapshot<SortingPage | null>(ctx, (db) => {
    const row = prepared(
      db.client,
      `select s.id, s.state, p.name as byName, s.occurred_at as occurredAt, s.recorded_at as recordedAt,
              s.net_grams as netGrams, s.difference_grams as differenceGrams,
              s.tolerance_mg as toleranceMilligrams, s.cause, s.corrects, s.done_by as doneBy, s.act_id as actId
         from sorting_sessions s join people p on p.id = s.done_by where s.id = ?`,
    ).get(id) as Row | undefined;
    if (!row) return null;
    const { doneBy, actId, ...session } = row;
    const later = listLaterUses(db, actId);
    const mayUndo =
      session.corrects === null &&
      judgeUndo({ ...session, doneBy }, actorId(ctx), ctx.now) === "fine" &&
      !takenSince(db, actId);
    return {
      ...session,
      scale: scaleOf(db, id),
      bags: bagsOf(db, row),
      fractions: listFractions(db, id),
      correction: correctionOf(db, id),
      later,
      undoUntil: mayUndo ? undoUntil(session.recordedAt) : null,
    };
  });
}

function scaleOf(db: Readable, id: string): SortingPage["scale"] {
  const found = prepared(
    db.client,
    `select s.id, s.name from fractions f join scales s on s.id = f.scale_id
      where f.session_id = ? order by f.seq limit 1`,
  ).get(id) as SortingPage["scale"] | undefined;
  return found ?? null;
}

function bagsOf(db: Readable, { id, actId, state }: Row): SortingPageBag[] {
  const bags = prepared(
    db.client,
    `select b.id, b.code, p.name as pointName from sorting_bags sb join bags b on b.id = sb.bag_id
       left join points p on p.id = b.point_id where sb.session_id = ? order by b.code`,
  ).all(id) as { id: BagId; code: LabelCode; pointName: string | null }[];
  const taken = takenFromBags(db, actId);
  return bags.map(({ id: bagId, code, pointName }) => {
    const weighed = getWeighedBag(db, bagId, code);
    const took = weighed ? (taken.get(weighed.holderId) ?? 0) : 0;
    // Only while it stands: a session that was taken back has put its grams into the bag again.
    const since = weighed && state === "closed" ? heldBy(db, weighed.holderId, UNSORTED) : 0;
    return {
      code,
      pointName,
      weighInId: weighed?.weighInId ?? null,
      netGrams: took + since,
      readings: weighed ? listLoads(db, weighed) : [],
    };
  });
}

function correctionOf(db: Readable, id: string): SortingPage["correction"] {
  const found = prepared(
    db.client,
    `select c.reason, c.replacement_id as replacementId, p.name as byName, c.at
       from corrections c join people p on p.id = c.done_by
      where c.subject_kind = 'sorting' and c.subject_id = ?`,
  ).get(id) as SortingPage["correction"] | undefined;
  return found ?? null;
}
