/** Reads of what went from one lot into another. */
import "server-only";
import { AppError } from "@/lib/core/errors";
import type { Id, LotId, PersonId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { mayStillUndo, undoUntil } from "@/lib/core/undo";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { MoveView } from "../contract/moves";
import type { IdentifyMethod, MoveKind, RecordState } from "../terms";
import { requireLot } from "./lot-record";

export type StoredMove = {
  id: Id<"lot-move">;
  kind: MoveKind;
  fromLotId: LotId;
  toLotId: LotId;
  grams: number;
  method: IdentifyMethod | null;
  scaleId: string | null;
  actId: number;
  corrects: Id<"lot-move"> | null;
  doneBy: PersonId;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
};

/** @throws AppError `not-found` */
export function requireMove(db: Readable, id: Id<"lot-move">): StoredMove {
  const row = prepared(
    db.client,
    `select id, kind, from_lot_id as fromLotId, to_lot_id as toLotId, grams, method, scale_id as scaleId,
            act_id as actId, corrects, done_by as doneBy, occurred_at as occurredAt,
            recorded_at as recordedAt, state
       from lot_moves where id = ?`,
  ).get(id) as StoredMove | undefined;
  if (!row) throw new AppError("not-found");
  return row;
}

/** Moves of a lot that a page shows; older ones stand in its history. */
const MOST_SHOWN = 10;

const VIEW = `
  select x.id as moveId, x.kind, f.number as fromNumber, t.number as toNumber, x.grams, x.method, x.state,
         p.name as byName, x.done_by as doneBy, x.occurred_at as occurredAt, x.recorded_at as recordedAt, x.corrects,
         (select c.reason from corrections c where c.subject_kind = 'lot-move' and c.subject_id = x.id) as reason
    from lot_moves x
    join lots f on f.id = x.from_lot_id
    join lots t on t.id = x.to_lot_id
    join people p on p.id = x.done_by`;

export const LOT_MOVES_SQL = `
  select * from (
    select * from (${VIEW} where x.from_lot_id = @lotId order by x.recorded_at desc limit ${MOST_SHOWN})
    union
    select * from (${VIEW} where x.to_lot_id = @lotId order by x.recorded_at desc limit ${MOST_SHOWN}))
  order by recordedAt desc, moveId desc limit ${MOST_SHOWN}`;

/** The last moves into and out of a lot, newest first. @throws AppError `not-found` */
export function listLotMoves(ctx: Context, number: number): MoveView[] {
  allow(ctx, "stock.read");
  return inSnapshot(ctx, (db) => {
    const { lotId } = requireLot(db, number);
    const rows = prepared(db.client, LOT_MOVES_SQL).all({ lotId }) as (Omit<
      MoveView,
      "undoUntil"
    > & { doneBy: string })[];
    return rows.map(({ doneBy, ...move }) => {
      const open =
        ctx.actor.kind === "person" &&
        ctx.actor.id === doneBy &&
        move.state === "posted" &&
        move.corrects === null &&
        mayStillUndo(move.recordedAt as Instant, ctx.now);
      return {
        ...move,
        byName: move.byName || "somebody who has left",
        undoUntil: open ? undoUntil(move.recordedAt) : null,
      };
    });
  });
}
