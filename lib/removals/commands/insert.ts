/** A removal's row with its lots; `corrects` names the one in whose place it stands. */
import "server-only";
import type { Id } from "@/lib/core/ids";
import { undoUntil } from "@/lib/core/undo";
import { requirePerson, type Context } from "@/lib/platform/context";
import { prepared, type Tx } from "@/lib/platform/database";
import type { RemovalReceipt } from "../contract/removals";
import type { PlannedRemoval } from "./plan";

export type RemovalRow = {
  id: Id<"removal">;
  noteNumber: string;
  corrects: Id<"removal"> | null;
  actId: number;
};

export function insertRemovalIn(
  tx: Tx,
  ctx: Context,
  planned: PlannedRemoval,
  row: RemovalRow,
): RemovalReceipt {
  const { destination, lots } = planned;
  const source = lots.length === 0 ? "reject-bin" : "stock";
  prepared(
    tx.client,
    `insert into removals (id, source, route, destination_id, receiver_name, receiver_number, carrier_name,
       carrier_number, waste_code, note_number, grams, difference_grams, basis, scale_id, gross_mg, tare_mg, done_by,
       occurred_at, recorded_at, state, corrects, act_id)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, 'posted', ?, ?)`,
  ).run(
    row.id,
    source,
    destination.route,
    destination.id,
    destination.name,
    destination.receiverNumber,
    destination.carrierName,
    destination.carrierNumber,
    destination.wasteCode,
    row.noteNumber,
    planned.grams,
    planned.differenceGrams,
    planned.basis,
    planned.scaleId,
    planned.grossMilligrams,
    planned.tareMilligrams,
    requirePerson(ctx),
    planned.occurredAt,
    ctx.now,
    row.corrects,
    row.actId,
  );
  const insert = prepared(
    tx.client,
    "insert into removal_lots (removal_id, lot_id, grams) values (?, ?, ?)",
  );
  for (const { lotId, grams } of lots) insert.run(row.id, lotId, grams);
  return {
    id: row.id,
    source,
    route: destination.route,
    grams: planned.grams,
    differenceGrams: planned.differenceGrams,
    basis: planned.basis,
    recordedAt: ctx.now,
    undoUntil: undoUntil(ctx.now),
  };
}
