/** Reads of counts: one as stored, those of a lot, those that wait for a lead. */
import "server-only";
import type * as z from "zod";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId, PersonId } from "@/lib/core/ids";
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import type { Instant } from "@/lib/core/time";
import { mayStillUndo, undoUntil } from "@/lib/core/undo";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { countsToReviewEndpoint, CountView } from "../contract/counts";
import { pileDetail, pileName } from "../rules/material-words";
import type { CountKind, RecordState } from "../terms";
import { requireLot } from "./lot-record";

export type StoredCount = {
  id: Id<"count">;
  kind: CountKind;
  lotId: LotId;
  bookGrams: number;
  countedGrams: number;
  sheet: string | null;
  actId: number | null;
  corrects: Id<"count"> | null;
  reviewedAt: Instant | null;
  doneBy: PersonId;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
};

/** @throws AppError `not-found` */
export function requireCount(db: Readable, id: Id<"count">): StoredCount {
  const row = prepared(
    db.client,
    `select id, kind, lot_id as lotId, book_grams as bookGrams, counted_grams as countedGrams, sheet, act_id as actId,
            corrects, reviewed_at as reviewedAt, done_by as doneBy, occurred_at as occurredAt,
            recorded_at as recordedAt, state
       from counts where id = ?`,
  ).get(id) as StoredCount | undefined;
  if (!row) throw new AppError("not-found");
  return row;
}

const VIEW = `
  select c.id as countId, c.kind, l.number, r.polymer, r.kind as materialKind, m.form, m.wash,
         coalesce(k.name, r.colour_code) as colourName, c.book_grams as bookGrams,
         c.counted_grams as countedGrams, c.basis, s.name as scaleName, c.sheet, c.state, p.name as byName,
         c.done_by as doneBy, c.occurred_at as occurredAt, c.recorded_at as recordedAt, v.name as reviewedBy,
         c.reviewed_at as reviewedAt, c.corrects,
         (select x.reason from corrections x where x.subject_kind = 'count' and x.subject_id = c.id) as reason
    from counts c
    join lots l on l.id = c.lot_id
    join materials m on m.id = l.material_id
    join rows r on r.id = m.row_id
    join people p on p.id = c.done_by
    left join colours k on k.code = r.colour_code
    left join scales s on s.id = c.scale_id
    left join people v on v.id = c.reviewed_by`;

type ViewRow = Omit<CountView, "material" | "undoUntil"> & {
  polymer: PolymerAnswer;
  materialKind: Kind;
  form: Form;
  wash: WashState;
  colourName: string;
  doneBy: string;
};

function viewOf(ctx: Context, row: ViewRow): CountView {
  const { polymer, materialKind, form, wash, colourName, doneBy, ...count } = row;
  const mine = ctx.actor.kind === "person" && ctx.actor.id === doneBy;
  const open =
    mine &&
    count.state === "posted" &&
    count.corrects === null &&
    mayStillUndo(count.recordedAt as Instant, ctx.now);
  return {
    ...count,
    byName: count.byName || "somebody who has left",
    material: `${pileName(colourName, polymer)}, ${pileDetail({ kind: materialKind, form, wash })}`,
    undoUntil: open ? undoUntil(count.recordedAt) : null,
  };
}

/** Counts of a lot that a page shows; older ones stand in its history. */
const MOST_SHOWN = 10;

/** The last counts of a lot, newest first. @throws AppError `not-found` */
export function listLotCounts(ctx: Context, number: number): CountView[] {
  allow(ctx, "stock.read");
  return inSnapshot(ctx, (db) => {
    const { lotId } = requireLot(db, number);
    const rows = prepared(
      db.client,
      `${VIEW} where c.lot_id = ? order by c.recorded_at desc, c.id desc limit ${MOST_SHOWN}`,
    ).all(lotId) as ViewRow[];
    return rows.map((row) => viewOf(ctx, row));
  });
}

const PAGE = 50;

export const TO_REVIEW_SQL = `${VIEW}
   where c.reviewed_at is null and c.state = 'posted' and (c.recorded_at, c.id) > (@at, @id)
   order by c.recorded_at, c.id limit ${PAGE + 1}`;

/** Counts that nobody has looked at, oldest first. */
export function listCountsToReview(
  ctx: Context,
  input: z.output<typeof countsToReviewEndpoint.input>,
): z.output<typeof countsToReviewEndpoint.output> {
  allow(ctx, "stock.review");
  return inSnapshot<z.output<typeof countsToReviewEndpoint.output>>(ctx, (db) => {
    const [at, id] = (input.after ?? "0.").split(".", 2);
    const found = prepared(db.client, TO_REVIEW_SQL).all({
      at: Number(at) || 0,
      id: id ?? "",
    }) as ViewRow[];
    const counts = found.slice(0, PAGE).map((row) => viewOf(ctx, row));
    const last = counts.at(-1);
    return {
      counts,
      next: found.length > PAGE && last ? `${last.recordedAt}.${last.countId}` : null,
      waiting: prepared(
        db.client,
        "select count(*) from counts where reviewed_at is null and state = 'posted'",
      )
        .pluck()
        .get() as number,
    };
  });
}
