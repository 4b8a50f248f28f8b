/** Everything that ever went into or out of one lot, read by the ledger's index of holders. */
import "server-only";
import type * as z from "zod";
import { allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import type { LotMovement, lotMovementsEndpoint, LotRecordRef } from "../contract/lots";
import { requireLot } from "./lot-record";

/** A ticket a row on a phone: more would be a long way to the end, and twice the page. */
const PAGE = 25;

export const MOVEMENTS_SQL = `
  select n.entry_id as entryId, n.seq, e.kind, e.occurred_at as occurredAt, e.booked_day as bookedDay,
         n.grams, n.after as afterGrams, p.name as doneBy, e.reverses, e.subject
    from lines n
    join entries e on e.id = n.entry_id
    left join people p on p.id = e.done_by
   where n.holder_id = @holderId and n.entry_id <= @entryId and (n.entry_id < @entryId or n.seq < @seq)
   order by n.entry_id desc, n.seq desc limit @limit`;

type Row = Omit<LotMovement, "bagCode" | "record"> & { subject: string };

/** What a record is called, and the other lot of a move: both by the record's own key. */
const RECORDS: Readonly<Record<string, string>> = {
  step: "select kind as detail, null as otherNumber from steps where id = @id",
  count: "select kind as detail, null as otherNumber from counts where id = @id",
  "lot-move": `select x.kind as detail, l.number as otherNumber from lot_moves x
      join lots l on l.id = case when x.from_lot_id = @lotId then x.to_lot_id else x.from_lot_id end where x.id = @id`,
};
const KINDS = ["weigh-in", "sorting", "step", "count", "lot-move", "removal"] as const;

function recordOf(db: Readable, subject: string, lotId: string): LotRecordRef {
  const [name = "", id = ""] = subject.split(":", 2);
  const kind = KINDS.find((known) => known === name) ?? "other";
  const sql = RECORDS[kind];
  const found = sql
    ? (prepared(db.client, sql).get({ id, lotId }) as
        Pick<LotRecordRef, "detail" | "otherNumber"> | undefined)
    : undefined;
  return { kind, id, detail: found?.detail ?? null, otherNumber: found?.otherNumber ?? null };
}

/** The tag of the bag that a record concerns: that of its weigh-in or of its sorting. */
function bagCodeOf(db: Readable, subject: string): string | null {
  const [kind, id] = subject.split(":", 2);
  const sql =
    kind === "weigh-in"
      ? "select b.code from weigh_ins w join bags b on b.id = w.bag_id where w.id = ?"
      : kind === "sorting"
        ? "select b.code from sorting_bags s join bags b on b.id = s.bag_id where s.session_id = ? limit 1"
        : null;
  if (!sql) return null;
  return (prepared(db.client, sql).pluck().get(id) as string | undefined) ?? null;
}

/**
 * One page of a lot's movements, newest first.
 *
 * @throws AppError `not-found` when there is no lot of that number
 */
export function listLotMovements(
  ctx: Context,
  input: z.output<typeof lotMovementsEndpoint.input>,
): z.output<typeof lotMovementsEndpoint.output> {
  allow(ctx, "stock.read");
  return inSnapshot<z.output<typeof lotMovementsEndpoint.output>>(ctx, (db) => {
    const { holderId, lotId } = requireLot(db, input.number);
    const [entryId, seq] = (input.before ?? `${Number.MAX_SAFE_INTEGER}.0`).split(".").map(Number);
    const found = prepared(db.client, MOVEMENTS_SQL).all({
      holderId,
      entryId,
      seq,
      limit: PAGE + 1,
    }) as Row[];
    const movements = found.slice(0, PAGE).map(({ subject, ...row }): LotMovement => ({
      ...row,
      bagCode: bagCodeOf(db, subject),
      record: recordOf(db, subject, lotId),
    }));
    const last = movements.at(-1);
    return {
      movements,
      next: found.length > PAGE && last ? `${last.entryId}.${last.seq}` : null,
    };
  });
}
