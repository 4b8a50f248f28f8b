/** One removal with everything that happened to it. */
import "server-only";
import type { Id, ScaleId } from "@/lib/core/ids";
import type { Instant } from "@/lib/core/time";
import { judgeUndo, undoUntil } from "@/lib/core/undo";
import type { Basis } from "@/lib/ledger/terms";
import { actorId, allow, type Context } from "@/lib/platform/context";
import { inSnapshot, prepared, type Readable } from "@/lib/platform/database";
import { pileName } from "@/lib/stock/rules/material-words";
import type { RecordState } from "@/lib/stock/terms";
import type { PolymerAnswer } from "@/lib/core/plastics";
import type { RemovalSource, Route } from "../terms";

/** Why a record was taken back, by whom, and what stands in its place. */
export type CorrectionView = {
  reason: string | null;
  replacementId: string | null;
  byName: string;
  at: Instant;
};

export type ReceiptView = {
  id: Id<"removal-receipt">;
  number: string;
  receivedGrams: number;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
  byName: string;
  /** null when it is not the reader's to undo, or the time is over. */
  undoUntil: number | null;
  correction: CorrectionView | null;
};

export type RemovalView = {
  id: Id<"removal">;
  source: RemovalSource;
  route: Route;
  destinationId: Id<"destination">;
  receiverName: string;
  receiverNumber: string;
  carrierName: string;
  carrierNumber: string;
  wasteCode: string;
  noteNumber: string;
  grams: number;
  differenceGrams: number;
  basis: Basis;
  scaleId: ScaleId | null;
  scaleName: string | null;
  grossMilligrams: number | null;
  tareMilligrams: number | null;
  occurredAt: Instant;
  recordedAt: Instant;
  state: RecordState;
  corrects: Id<"removal"> | null;
  byName: string;
  undoUntil: number | null;
  lots: { number: number; name: string; grams: number }[];
  /** Newest first; at most one of them is posted. */
  receipts: ReceiptView[];
  correction: CorrectionView | null;
};

type Row = Omit<RemovalView, "lots" | "receipts" | "correction" | "undoUntil"> & { doneBy: string };

function getCorrection(db: Readable, kind: string, id: string): CorrectionView | null {
  const row = prepared(
    db.client,
    `select c.reason, c.replacement_id as replacementId, p.name as byName, c.at
       from corrections c join people p on p.id = c.done_by
      where c.subject_kind = ? and c.subject_id = ?`,
  ).get(kind, id);
  return (row as CorrectionView | undefined) ?? null;
}

function listReceipts(db: Readable, ctx: Context, removalId: string): ReceiptView[] {
  const found = prepared(
    db.client,
    `select r.id, r.number, r.received_grams as receivedGrams, r.occurred_at as occurredAt,
            r.recorded_at as recordedAt, r.state, r.done_by as doneBy, p.name as byName
       from removal_receipts r join people p on p.id = r.done_by
      where r.removal_id = ? order by r.recorded_at desc, r.id desc`,
  ).all(removalId) as (Omit<ReceiptView, "undoUntil" | "correction"> & { doneBy: string })[];
  return found.map(({ doneBy, ...receipt }) => ({
    ...receipt,
    undoUntil: undoOf(ctx, { ...receipt, doneBy }),
    correction: getCorrection(db, "removal-receipt", receipt.id),
  }));
}

function listTakenLots(db: Readable, removalId: string): RemovalView["lots"] {
  const found = prepared(
    db.client,
    `select l.number, t.grams, r.polymer, coalesce(c.name, r.colour_code) as colourName
       from removal_lots t
       join lots l on l.id = t.lot_id
       join materials m on m.id = l.material_id
       join "rows" r on r.id = m.row_id
       left join colours c on c.code = r.colour_code
      where t.removal_id = ? order by l.number`,
  ).all(removalId) as {
    number: number;
    grams: number;
    polymer: PolymerAnswer;
    colourName: string;
  }[];
  return found.map(({ number, grams, polymer, colourName }) => ({
    number,
    grams,
    name: pileName(colourName, polymer),
  }));
}

function undoOf(
  ctx: Context,
  record: { state: string; doneBy: string; recordedAt: Instant },
): number | null {
  const mine = judgeUndo(record, actorId(ctx), ctx.now) === "fine";
  return mine ? undoUntil(record.recordedAt) : null;
}

/** One removal, or null. */
export function getRemoval(ctx: Context, id: string): RemovalView | null {
  allow(ctx, "removals.read");
  return inSnapshot<RemovalView | null>(ctx, (db) => {
    const row = prepared(
      db.client,
      `select m.id, m.source, m.route, m.destination_id as destinationId, m.receiver_name as receiverName,
              m.receiver_number as receiverNumber, m.carrier_name as carrierName, m.carrier_number as carrierNumber,
              m.waste_code as wasteCode, m.note_number as noteNumber, m.grams, m.difference_grams as differenceGrams,
              m.basis, m.scale_id as scaleId, s.name as scaleName, m.gross_mg as grossMilligrams,
              m.tare_mg as tareMilligrams, m.occurred_at as occurredAt, m.recorded_at as recordedAt, m.state,
              m.corrects, m.done_by as doneBy, p.name as byName
         from removals m join people p on p.id = m.done_by left join scales s on s.id = m.scale_id
        where m.id = ?`,
    ).get(id) as Row | undefined;
    if (!row) return null;
    const { doneBy, ...removal } = row;
    const receipts = listReceipts(db, ctx, id);
    const proven = receipts.some(({ state }) => state === "posted");
    return {
      ...removal,
      // The replacement of a correction, and what a receipt was entered for, are corrected and not undone.
      undoUntil: removal.corrects !== null || proven ? null : undoOf(ctx, row),
      lots: listTakenLots(db, id),
      receipts,
      correction: getCorrection(db, "removal", id),
    };
  });
}
